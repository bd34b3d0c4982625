import { plainTraces } from '$lib/server/services/traces';
import { packTraces, TRACES_BINARY, type BinaryTraces } from '$lib/utils/traces-binary';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

const brotli = promisify(brotliCompress);
const deflated = promisify(gzip);

/** Traces in the form that was asked for: compact binary, compressed once, or JSON. */
export async function tracesAnswer(request: Request, traces: BinaryTraces): Promise<Response> {
	const binary = request.headers.get('accept')?.includes(TRACES_BINARY) ?? false;
	const body = binary ? packTraces(traces) : Buffer.from(JSON.stringify(plainTraces(traces)));
	const headers: Record<string, string> = {
		'content-type': binary ? TRACES_BINARY : 'application/json',
		'cache-control': 'private, no-cache',
		vary: 'accept, accept-encoding'
	};
	const accepts = request.headers.get('accept-encoding') ?? '';
	if (accepts.includes('br')) {
		const packed = await brotli(body, { params: { [constants.BROTLI_PARAM_QUALITY]: 3 } });
		return new Response(new Uint8Array(packed), { headers: { ...headers, 'content-encoding': 'br' } });
	}
	if (accepts.includes('gzip')) {
		return new Response(new Uint8Array(await deflated(body, { level: 4 })), {
			headers: { ...headers, 'content-encoding': 'gzip' }
		});
	}
	return new Response(new Uint8Array(body), { headers });
}
