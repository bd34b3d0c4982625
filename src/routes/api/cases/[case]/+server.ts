import { caseOf, changeCase } from '$lib/server/services/cases';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';

export const GET = endpoint(operations.getCase, ({ actor, params, units }) => caseOf(actor, params.case ?? '', units));
export const PATCH = endpoint(operations.changeCase, ({ actor, params, body, units }) =>
	changeCase(actor, params.case ?? '', body, units)
);
