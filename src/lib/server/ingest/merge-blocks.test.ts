import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mergeBlocks, type DecodedBlock } from './merge-blocks';

const block = (ordinal: number, pairs: [number, number][]): DecodedBlock => ({
	ordinal,
	t: Float64Array.from(pairs, (p) => p[0]),
	v: Float64Array.from(pairs, (p) => p[1]),
	logging: 'interval',
	increment: null,
	measure: null
});
const pairs = (m: ReturnType<typeof mergeBlocks>) => [...m.series.t].map((t, i) => [t, m.series.v[i]]);

/** Plain and slow: a map by instant, logs laid over one another in order of upload. */
function rebuilt(blocks: readonly DecodedBlock[]): (number | undefined)[][] {
	const byTime = new Map<number, number>();
	for (const b of [...blocks].sort((x, y) => x.ordinal - y.ordinal)) {
		b.t.forEach((t, i) => {
			const v = b.v[i] ?? NaN;
			if (!byTime.has(t) || !Number.isNaN(v)) byTime.set(t, v);
		});
	}
	return [...byTime].sort((a, b) => a[0] - b[0]);
}

const log = fc
	.uniqueArray(fc.tuple(fc.integer({ min: 0, max: 60 }), fc.oneof(fc.integer({ min: 0, max: 5 }), fc.constant(NaN))), {
		selector: (p) => p[0],
		maxLength: 25
	})
	.map((list) => list.sort((a, b) => a[0] - b[0]));

describe('mergeBlocks', () => {
	it('lets the later upload win and counts what it changed', () => {
		const m = mergeBlocks([
			block(2, [
				[10, 5],
				[20, 6]
			]),
			block(1, [
				[0, 1],
				[10, 2],
				[20, 6]
			])
		]);
		expect(pairs(m)).toEqual([
			[0, 1],
			[10, 5],
			[20, 6]
		]);
		expect(m.conflicts).toBe(1);
	});
	it('keeps an earlier reading where the later log has none', () => {
		expect(pairs(mergeBlocks([block(1, [[0, 1]]), block(2, [[0, NaN]])]))).toEqual([[0, 1]]);
	});
	it('shares the times of a single block', () => {
		const only = block(1, [
			[0, 1],
			[1, 2]
		]);
		expect(mergeBlocks([only]).series.t).toBe(only.t);
	});
	it('refuses to merge nothing', () => {
		expect(() => mergeBlocks([block(1, [])])).toThrow(TypeError);
	});
	it('equals a rebuild from the logs that remain, whatever the order of blocks and deletions', () => {
		fc.assert(
			fc.property(
				fc.array(log, { maxLength: 6 }),
				fc.array(fc.nat(5)),
				fc.infiniteStream(fc.nat(1000)),
				(logs, deleted, noise) => {
					const stored = logs.flatMap((list, rank) => {
						// A log is stored in parts; a delete takes all parts of its rank.
						const half = Math.floor(list.length / 2);
						return [block(rank, list.slice(0, half)), block(rank, list.slice(half))];
					});
					const left = stored.filter((b) => !deleted.includes(b.ordinal));
					const shuffled = left
						.map((b) => [noise.next().value ?? 0, b] as const)
						.sort((a, b) => a[0] - b[0])
						.map(([, b]) => b);
					if (left.some((b) => b.t.length > 0)) expect(pairs(mergeBlocks(shuffled))).toEqual(rebuilt(left));
				}
			),
			{ numRuns: 400 }
		);
	});
	it('says interval as soon as one log was', () => {
		const change = { ...block(1, [[0, 1]]), logging: 'change' as const };
		expect(mergeBlocks([change]).series.logging).toBe('change');
		expect(mergeBlocks([change, block(2, [[5, 1]])]).series.logging).toBe('interval');
	});
});
