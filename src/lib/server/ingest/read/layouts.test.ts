import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { context, readBack, sourceFile } from '../testing/harness';
import { IP_FIELDS, plantRows, SI_FIELDS, STAMPS, wideText, type PlantRow } from '../testing/plant';
import type { ReadBack } from '../testing/harness';

/** Invented data: two and a half days at a minute, through the 3rd of March 2025. */
const FROM = Date.UTC(2025, 2, 3, 5);
const ROWS = plantRows(FROM, 2.5, 60);
const NY = 'America/New_York';

/** Every reading where it belongs, to the resolution the file was written in. */
function expectPlant(got: ReadBack, rows: readonly PlantRow[], tolerance: number, timeStep = 1000): void {
	expect(got.inspection.questions).toEqual([]);
	expect(got.inspection.decision).toBe('ready');
	expect(got.result?.rows).toBe(rows.length);
	const checks = [
		['running', 'running', 0],
		['evapSaturation', 'evapSat', tolerance],
		['evapPressure', 'evapKpa', 4],
		['evapWaterIn', 'waterIn', tolerance],
		['evapWaterOut', 'waterOut', tolerance],
		['condSaturation', 'condSat', tolerance],
		['condPressure', 'condKpa', 4],
		['condWaterIn', 'condIn', tolerance],
		['condWaterOut', 'condOut', tolerance],
		['oilTemp', 'oil', tolerance + 0.05],
		['capacity', 'capacity', 0.06],
		['motorCurrent', 'amps', 0.6],
		['valvePosition', 'valve', 0.6]
	] as const;
	for (const [signal, key, within] of checks) {
		const { t, v } = got.series(signal);
		expect([signal, t.length]).toEqual([signal, rows.length]);
		const worst = Math.max(...rows.map((row, i) => Math.abs((v[i] ?? NaN) - row[key])));
		expect([signal, worst <= within + 1e-9]).toEqual([signal, true]);
		expect(Math.max(...rows.map((row, i) => Math.abs((t[i] ?? NaN) - row.t)))).toBeLessThan(timeStep);
	}
	expect(got.events.map((e) => [e.what, e.text])).toEqual([
		['activation', 'Low evaporator saturation'],
		['clearing', 'Low evaporator saturation']
	]);
}

describe('wide layouts', () => {
	const ip = (stamp: (t: number) => string, options = {}) => wideText(ROWS, IP_FIELDS, stamp, options);
	const si = (stamp: (t: number) => string, options = {}) => wideText(ROWS, SI_FIELDS, stamp, options);
	const berlin = context({ timeZone: 'Europe/Berlin' });

	it.each([
		['comma, ISO', ip((t) => STAMPS.iso(t, NY)), 0.06, 1000],
		['comma, ISO with Z', ip(STAMPS.isoZ), 0.06, 1000],
		['comma, US 12 hours', ip((t) => STAMPS.us12(t, NY)), 0.06, 1000],
		['tab, US 12 hours', ip((t) => STAMPS.us12(t, NY), { delimiter: '\t' }), 0.06, 1000],
		['quoted everywhere', ip((t) => STAMPS.us12(t, NY), { quote: true }), 0.06, 1000],
		['CRLF', ip((t) => STAMPS.iso(t, NY), { eol: '\r\n' }), 0.06, 1000],
		['CR alone, serial days', ip((t) => STAMPS.serial(t, NY), { eol: '\r' }), 0.06, 1000],
		['epoch seconds', ip(STAMPS.epoch, { timeName: 'timestamp' }), 0.06, 1000],
		['month names', ip((t) => STAMPS.month(t, NY)), 0.06, 1000],
		['a mark at the front', '\ufeff' + ip((t) => STAMPS.iso(t, NY)), 0.06, 1000],
		['trade letters, no units', si((t) => STAMPS.iso(t, NY)), 0.006, 1000]
	])('%s', async (_, text, tolerance, step) => {
		expectPlant(await readBack([sourceFile('week.csv', text)]), ROWS, tolerance, step);
	});

	it.each([
		[
			'semicolon, day first, decimal comma',
			si((t) => STAMPS.dayFirst(t, 'Europe/Berlin'), { delimiter: ';', decimalComma: true })
		],
		[
			'semicolon, slashes, decimal comma',
			si((t) => STAMPS.dayFirstSlash(t, 'Europe/Berlin'), { delimiter: ';', decimalComma: true })
		],
		['tab, decimal comma', si((t) => STAMPS.dayFirst(t, 'Europe/Berlin'), { delimiter: '\t', decimalComma: true })]
	])('%s', async (_, text) => {
		expectPlant(await readBack([sourceFile('woche.csv', text)], berlin), ROWS, 0.006);
	});

	it('gzip', async () => {
		const text = ip((t) => STAMPS.iso(t, NY));
		expectPlant(await readBack([sourceFile('week.csv.gz', gzipSync(text))]), ROWS, 0.06);
	});

	it('titles before and totals after', async () => {
		const text = `Trend export\nUnit:,CH-1\nFrom,2025-03-03\n\n${ip((t) => STAMPS.iso(t, NY))}\nAverage,,,44\nMaximum,,,46\n"1,234 rows"\n`;
		const got = await readBack([sourceFile('week.csv', text)]);
		expectPlant(got, ROWS, 0.06);
		expect(got.inspection.layout?.headerLine).toBe(5);
		expect(got.result?.problems.map((p) => p.kind)).toEqual(['row-no-time', 'row-no-time', 'row-no-time']);
	});

	it('a row of units under the names, and UTF-16', async () => {
		const [header = '', ...rest] = ip((t) => STAMPS.iso(t, NY)).split('\n');
		const names = header.split(',').map((n) => n.replace(/ \(.*\)/, ''));
		const units = header.split(',').map((n) => /\((.*)\)/.exec(n)?.[1] ?? '');
		const text = [names.join(','), units.join(','), ...rest].join('\n');
		expectPlant(await readBack([sourceFile('week.csv', Buffer.from('\ufeff' + text, 'utf16le'))]), ROWS, 0.06);
	});

	it('date and clock in two columns', async () => {
		const text = ip((t) => STAMPS.us12(t, NY).replace(' ', ',')).replace('Time,', 'Date,Time,');
		expectPlant(await readBack([sourceFile('week.csv', text)]), ROWS, 0.06);
	});

	it('newest row first', async () => {
		const text = wideText([...ROWS].reverse(), IP_FIELDS, (t) => STAMPS.iso(t, NY));
		const got = await readBack([sourceFile('week.csv', text)]);
		expect(got.result?.quality.outOfOrder).toBe(0);
		expect(got.series('evapWaterOut').t).toEqual(ROWS.map((r) => r.t));
	});
});
