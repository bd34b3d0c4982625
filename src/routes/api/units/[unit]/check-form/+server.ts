import { checkFormOf } from '$lib/server/services/checks';
import { endpoint } from '$lib/server/web/endpoint';
import { checkForm } from '$lib/server/web/operations/circle';

export const GET = endpoint(checkForm, ({ actor, params }) => checkFormOf(actor, params.unit ?? ''));
