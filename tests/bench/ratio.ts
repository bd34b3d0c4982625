import { median } from 'simple-statistics';

/** Timings only count against a peer in the same run: the machine is shared and noisy. */

async function seconds(work: () => unknown): Promise<number> {
	const begun = performance.now();
	await work();
	return (performance.now() - begun) / 1000;
}

/** Runs both in turn, so that a busy moment hits both, and gives the medians and their ratio. */
export async function paired(
	own: () => unknown,
	peer: () => unknown,
	times = 5
): Promise<{ own: number; peer: number; ratio: number }> {
	const a: number[] = [];
	const b: number[] = [];
	for (let i = 0; i < times; i++) {
		b.push(await seconds(peer));
		a.push(await seconds(own));
	}
	return { own: median(a), peer: median(b), ratio: median(a) / median(b) };
}

export function printRow(what: string, figure: string, target: string, detail = ''): void {
	console.log(`${what.padEnd(58)} ${figure.padStart(10)}   target ${target.padEnd(10)} ${detail}`);
}
