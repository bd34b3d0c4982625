import { reportOf, saveReport } from '$lib/server/services/report';
import { reportPaper, sendReport } from '$lib/server/services/visit-papers';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/circle';
import { pdfAnswer, wantsPdf } from '$lib/server/web/pdf-answer';

export const GET = endpoint(operations.getReport, async ({ actor, params, units, event }) => {
	const visit = params.visit ?? '';
	if (wantsPdf(event)) return pdfAnswer(await reportPaper(actor, visit, units), 'report.pdf');
	return reportOf(actor, visit, units);
});
export const PUT = endpoint(operations.saveReport, ({ actor, params, body, units }) =>
	saveReport(actor, params.visit ?? '', body, units)
);
export const POST = endpoint(operations.sendReport, async ({ actor, params, body, units }) => {
	await sendReport(actor, params.visit ?? '', body.to, units);
	return reportOf(actor, params.visit ?? '', units);
});
