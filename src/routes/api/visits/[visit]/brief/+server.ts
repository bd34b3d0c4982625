import { briefOf } from '$lib/server/services/brief';
import { briefPaper, sendBrief } from '$lib/server/services/visit-papers';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';
import { pdfAnswer, wantsPdf } from '$lib/server/web/pdf-answer';

export const GET = endpoint(operations.getBrief, async ({ actor, params, units, event }) => {
	const visit = params.visit ?? '';
	if (wantsPdf(event)) return pdfAnswer(await briefPaper(actor, visit, units), 'brief.pdf');
	return briefOf(actor, visit, units);
});
export const POST = endpoint(operations.sendBrief, ({ actor, params }) => sendBrief(actor, params.visit ?? ''));
