import { describe, expect, it } from 'vitest';
import { context, readBack, sourceFile } from '../testing/harness';

/** A small invented log: stamps as given, water and status made up. */
function log(stamps: readonly string[], header = 'Time'): string {
	return (
		[
			`${header},Compressor Running,Leaving Water Temp (°F)`,
			...stamps.map((s, i) => `${s},${i % 9 > 3 ? 1 : 0},${44 + (i % 5)}.1`)
		].join('\n') + '\n'
	);
}
const at = (ms: number | undefined) => (ms === undefined ? '' : new Date(ms).toISOString().slice(0, 16));
const minutes = (from: string, n: number, write: (d: Date) => string, step = 10) =>
	Array.from({ length: n }, (_, i) => write(new Date(Date.parse(`${from}Z`) + i * step * 60_000)));
const plain = (d: Date) => d.toISOString().slice(0, 19).replace('T', ' ');
const slash = (d: Date) =>
	`${String(d.getUTCDate()).padStart(2, '0')}/${String(d.getUTCMonth() + 1).padStart(2, '0')}/${d.getUTCFullYear()} ${d.toISOString().slice(11, 16)}`;

describe('time', () => {
	it('walks through the repeated hour by order (New York, 2024-11-03)', async () => {
		const walls = ['00:30', '01:00', '01:30', '01:00', '01:30', '02:00', '02:30'].map((c) => `2024-11-03 ${c}`);
		const got = await readBack([sourceFile('w.csv', log(walls))]);
		expect(got.series('evapWaterOut').t.map(at)).toEqual(
			['04:30', '05:00', '05:30', '06:00', '06:30', '07:00', '07:30'].map((c) => `2024-11-03T${c}`)
		);
		expect(got.result?.quality).toMatchObject({ outOfOrder: 0, repeats: 0, gaps: 0 });
	});
	it('reports the missing hour with its line (New York, 2024-03-10)', async () => {
		const got = await readBack([
			sourceFile('w.csv', log(['2024-03-10 01:30', '2024-03-10 02:30', '2024-03-10 03:30']))
		]);
		expect(got.series('evapWaterOut').t.map(at)).toEqual(['2024-03-10T06:30', '2024-03-10T07:30']);
		expect(got.result?.problems.filter((p) => p.kind === 'missing-local-time').map((p) => p.line)).toEqual([3]);
		expect(got.result?.quality.badValues.time).toBe(1);
	});
	it('takes the zone of the site, of the header, of the stamps, of the uploader', async () => {
		const summer = minutes('2024-07-01T12:00:00', 20, plain);
		const first = async (text: string, ctx = context()) =>
			at((await readBack([sourceFile('w.csv', text)], ctx)).series('evapWaterOut').t[0]);
		expect(await first(log(summer))).toBe('2024-07-01T16:00');
		expect(await first(log(summer, 'Time (UTC)'))).toBe('2024-07-01T12:00');
		expect(await first(log(summer.map((s) => `${s} EST`)))).toBe('2024-07-01T17:00');
		expect(await first(log(summer.map((s) => s.replace(' ', 'T') + '+02:00')))).toBe('2024-07-01T10:00');
		expect(await first(log(summer), context({ zoneOverride: 'Europe/London' }))).toBe('2024-07-01T11:00');
		expect(await first(`Time zone: Europe/Berlin\n\n${log(summer)}`)).toBe('2024-07-01T10:00');
	});
	it('asks when day and month both fit, and takes the answer', async () => {
		const text = log(minutes('2025-04-03T06:00:00', 60, slash));
		const asked = await readBack([sourceFile('w.csv', text)]);
		expect(asked.inspection.decision).toBe('needs-mapping');
		expect(asked.inspection.choices.find((c) => c.key === 'date-order')).toMatchObject({ sure: false });
		const told = await readBack([sourceFile('w.csv', text)], context({ answers: { 'date-order': 'dmy' } }));
		expect(told.inspection.decision).toBe('ready');
		expect(at(told.series('evapWaterOut').t[0])).toBe('2025-04-03T10:00');
	});
	it('does not ask when the order of the rows, or the calendar, tells', async () => {
		const days = await readBack([sourceFile('w.csv', log(minutes('2025-04-03T06:00:00', 400, slash)))]);
		expect(days.inspection.decision).toBe('ready');
		expect(at(days.series('evapWaterOut').t[0])).toBe('2025-04-03T10:00');
		const future = await readBack(
			[sourceFile('w.csv', log(minutes('2025-04-12T06:00:00', 30, slash)))],
			context({ now: Date.UTC(2025, 4, 1) })
		);
		expect(at(future.series('evapWaterOut').t[0])).toBe('2025-04-12T10:00');
	});
	it('asks for the year when there is none, and carries it over New Year', async () => {
		const walls = minutes(
			'2024-12-31T20:00:00',
			60,
			(d) => ` ${d.toISOString().slice(5, 16).replace('-', '/').replace('T', '  ')}:00`
		);
		const asked = await readBack([sourceFile('w.csv', log(walls, 'Date/Time'))]);
		expect(asked.inspection.choices.find((c) => c.key === 'year')).toMatchObject({ chosen: '2024', sure: false });
		const told = await readBack(
			[sourceFile('w.csv', log(walls, 'Date/Time'))],
			context({ answers: { year: '2024', 'date-order': 'md' } })
		);
		expect(told.inspection.decision).toBe('ready');
		expect([at(told.series('evapWaterOut').t[0]), at(told.series('evapWaterOut').t.at(-1))]).toEqual([
			'2025-01-01T01:00',
			'2025-01-01T10:50'
		]);
	});
	it('leaves out stamps of 1970 and counts rows that go back or repeat', async () => {
		const walls = minutes('2025-04-03T06:00:00', 30, plain);
		walls.splice(10, 0, '1970-01-01 00:00:05', walls[9] ?? '', walls[5] ?? '');
		const got = await readBack([sourceFile('w.csv', log(walls))]);
		expect(got.series('evapWaterOut').t).toHaveLength(30);
		expect(got.result?.quality).toMatchObject({ repeats: 1, outOfOrder: 1, badValues: { time: 1 } });
		expect(got.result?.problems.map((p) => [p.kind, p.line])).toContainEqual(['impossible-time', 12]);
	});
	it('finds gaps, but none where a logger slows down', async () => {
		const walls = [
			...minutes('2025-04-03T06:00:00', 30, plain, 1),
			...minutes('2025-04-03T09:00:00', 30, plain, 1),
			...minutes('2025-04-03T09:34:00', 20, plain, 5)
		];
		const got = await readBack([sourceFile('w.csv', log(walls))]);
		expect(got.result?.quality).toMatchObject({ gaps: 1, longestGapSeconds: 151 * 60 });
		expect(got.result?.quality.coverage).toBeLessThan(0.6);
	});
});
