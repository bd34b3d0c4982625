/** Open event streams hold a server's shutdown, so they are all ended when it is asked to stop. */
const open = new Set<() => void>();
let listening = false;

function endAllOnStop(): void {
	if (listening) return;
	listening = true;
	const end = (): void => {
		for (const close of open) close();
	};
	process.on('SIGTERM', end);
	process.on('SIGINT', end);
}

/** Server-sent events: asks `look` again and again, sends its data when it has changed, and ends when it is done. */
export function eventStream(
	signal: AbortSignal,
	everyMs: number,
	look: () => Promise<{ data: unknown; done: boolean }>
): Response {
	endAllOnStop();
	const encoder = new TextEncoder();
	let timer: NodeJS.Timeout | undefined;
	let ended = false;
	let close = (): void => undefined;
	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			close = () => {
				if (ended) return;
				ended = true;
				clearTimeout(timer);
				open.delete(close);
				controller.close();
			};
			open.add(close);
			signal.addEventListener('abort', close);
			let last = '';
			const step = async (): Promise<void> => {
				const { data, done } = await look();
				if (ended) return;
				const text = JSON.stringify(data);
				if (text !== last) controller.enqueue(encoder.encode(`data: ${text}\n\n`));
				last = text;
				if (done) close();
				else timer = setTimeout(() => void step().catch(close), everyMs);
			};
			void step().catch(close);
		},
		cancel: () => close()
	});
	return new Response(stream, {
		headers: { 'content-type': 'text/event-stream', 'cache-control': 'no-store', 'x-accel-buffering': 'no' }
	});
}
