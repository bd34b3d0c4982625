import type { RequestEvent } from '@sveltejs/kit';

/** Is a PDF asked for, by `Accept` or (for a plain link) by `?as=pdf`? */
export function wantsPdf({ request, url }: RequestEvent): boolean {
	return url.searchParams.get('as') === 'pdf' || (request.headers.get('accept') ?? '').startsWith('application/pdf');
}

/** A PDF that opens in the browser. */
export function pdfAnswer(bytes: Uint8Array, name: string): Response {
	return new Response(new Uint8Array(bytes), {
		headers: {
			'content-type': 'application/pdf',
			'content-disposition': `inline; filename="${name}"`,
			'cache-control': 'no-store'
		}
	});
}
