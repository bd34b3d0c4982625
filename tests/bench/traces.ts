/** `npm run bench -- traces`: a year of one signal reduced, against a plain sum over it. */
import { reduceTrace } from '../../src/lib/server/analysis/reduce';
import { paired, printRow } from './ratio';

const POINTS = 525_600 * 4;

export async function benchTraces(): Promise<void> {
	const t = Float64Array.from({ length: POINTS }, (_, i) => i * 15_000);
	const v = Float64Array.from({ length: POINTS }, (_, i) => Math.sin(i * 0.001) * 10 + ((i * 2654435761) % 97) / 97);
	let kept = 0;
	const sum = (): void => {
		let total = 0;
		for (let i = 0; i < v.length; i++) total += v[i] ?? 0;
		kept += total;
	};
	const reduce = (): void => {
		kept += reduceTrace(t, v, 1000).t.length;
	};
	sum();
	reduce();
	const { ratio, own, peer } = await paired(reduce, sum, 9);
	printRow(
		'a year of one signal reduced, per point, of a sum loop',
		ratio.toFixed(2),
		'≤ 3',
		`own ${(own * 1000).toFixed(1)} ms, sum ${(peer * 1000).toFixed(1)} ms`
	);
	if (kept === 0) throw new Error('nothing was reduced');
}
