import { describe, expect, it } from 'vitest';
import { context, readBack, sourceFile } from '../testing/harness';
import { alignedCuts, alignLine } from './aligned';

/** Invented: a minute apart, on from the tenth; every seventh row has no current. */
const stamp = (i: number) => `2025-03-05 10:${String(i).padStart(2, '0')}:00`;
const rows = Array.from({ length: 60 }, (_, i) => {
	const amps = i % 7 === 3 ? '' : String(i > 9 ? 200 + i : 0);
	return `${stamp(i)}   ${i > 9 ? 1 : 0}        ${amps.padEnd(10)}  ${(44 + i / 100).toFixed(2)}`;
});
const text = ['Trend of the plant', '', 'Time                  Comp On  Current A   Leaving Water F', ...rows].join(
	'\n'
);

describe('a table aligned by spaces', () => {
	it('is cut where its columns begin, blanks kept in their place', () => {
		const cuts = alignedCuts(text) ?? [];
		expect(cuts).toHaveLength(4);
		expect(alignLine(rows[3] ?? '', cuts).split('\t')).toEqual([stamp(3), '0', '', '44.03']);
	});

	it('is read like any other', async () => {
		const got = await readBack([sourceFile('plant.txt', text, 777)], context({ timeZone: 'UTC' }));
		expect(got.inspection.problems).toEqual([]);
		expect(got.result?.problems).toEqual([]);
		expect(got.result?.rows).toBe(60);
		expect(got.series('evapWaterOut').v).toHaveLength(60);
		expect(got.series('motorCurrent').v).toHaveLength(60 - 9);
		expect(got.series('motorCurrent').v.at(-1)).toBe(258);
	});

	it('is told from tables with a delimiter and from prose', () => {
		expect(alignedCuts(rows.map((row) => row.replaceAll(/ {2,}/g, ';')).join('\n'))).toBeNull();
		expect(alignedCuts('It is down again this morning.\n'.repeat(20))).toBeNull();
	});
});
