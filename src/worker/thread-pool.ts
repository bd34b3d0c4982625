import { Worker } from 'node:worker_threads';

type Waiting = { task: unknown; done: () => void; fail: (error: Error) => void };

/** A fixed number of threads that each do one task at a time. A thread that dies fails its task and is replaced. */
export class ThreadPool {
	#idle: Worker[] = [];
	#all = new Set<Worker>();
	#queue: Waiting[] = [];
	#closed = false;

	constructor(
		private readonly program: string,
		private readonly size: number
	) {}

	/** Runs a task to its end. Rejects with the thread's error. */
	run(task: unknown): Promise<void> {
		return new Promise((done, fail) => {
			this.#queue.push({ task, done, fail });
			this.#next();
		});
	}

	#next(): void {
		if (this.#queue.length === 0 || this.#closed) return;
		const worker = this.#idle.pop() ?? (this.#all.size < this.size ? this.#spawn() : undefined);
		const waiting = worker && this.#queue.shift();
		if (worker && waiting) this.#give(worker, waiting);
	}

	#spawn(): Worker {
		const worker = new Worker(this.program);
		this.#all.add(worker);
		worker.once('exit', () => this.#all.delete(worker));
		return worker;
	}

	#give(worker: Worker, { task, done, fail }: Waiting): void {
		const settle = (end: () => void, reusable: boolean): void => {
			worker.removeAllListeners('message');
			worker.removeAllListeners('error');
			if (reusable) this.#idle.push(worker);
			else this.#all.delete(worker);
			end();
			this.#next();
		};
		worker.once('message', (answer: { error: string | null }) =>
			settle(() => (answer.error === null ? done() : fail(new Error(answer.error))), true)
		);
		worker.once('error', (error: Error) => settle(() => fail(error), false));
		worker.postMessage(task);
	}

	/** Ends every thread; what they were doing is taken up at the next start. */
	async close(): Promise<void> {
		this.#closed = true;
		await Promise.all([...this.#all].map((worker) => worker.terminate()));
	}
}
