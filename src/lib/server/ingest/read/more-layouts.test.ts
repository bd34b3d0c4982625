import ExcelJS from 'exceljs';
import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { context, readBack, sourceFile, unitRef } from '../testing/harness';
import { IP_FIELDS, plantRows, SI_FIELDS, STAMPS, wideText, type Field } from '../testing/plant';

/** Invented data: two days at five minutes. */
const FROM = Date.UTC(2025, 2, 3, 5);
const ROWS = plantRows(FROM, 2, 300);
const NY = 'America/New_York';
const iso = (t: number) => STAMPS.iso(t, NY);
const worst = (v: number[], of: (i: number) => number) => Math.max(...v.map((x, i) => Math.abs(x - of(i))));

function expectSeries(got: Awaited<ReturnType<typeof readBack>>, circuit = '1', unitId = 'unit-1', shift = 0): void {
	const { decision, questions, problems } = got.inspection;
	expect([decision, questions, problems]).toEqual(['ready', [], problems]);
	const sat = got.series('evapSaturation', circuit, unitId);
	expect(sat.t).toHaveLength(ROWS.length);
	expect(worst(sat.t, (i) => ROWS[i]?.t ?? NaN)).toBe(0);
	expect(worst(sat.v, (i) => (ROWS[i]?.evapSat ?? NaN) + shift)).toBeLessThan(0.06);
	expect(got.series('running', circuit, unitId).v).toEqual(ROWS.map((r) => r.running));
}

/** The same machine with every reading a little higher: a second circuit or unit. */
function second(value: Field[1]): Field[1] {
	return (r) =>
		value({
			...r,
			evapSat: r.evapSat + 0.5,
			condSat: r.condSat + 0.5,
			evapKpa: r.evapKpa + 6,
			condKpa: r.condKpa + 12,
			suction: r.suction + 0.5,
			discharge: r.discharge + 0.5,
			oil: r.oil + 1,
			oilKpa: r.oilKpa + 9,
			waterIn: r.waterIn + 0.5,
			waterOut: r.waterOut + 0.5,
			condIn: r.condIn + 0.5,
			condOut: r.condOut + 0.5,
			amps: r.amps * 1.1,
			capacity: r.capacity * 0.97,
			demand: r.demand * 0.99,
			valve: r.valve + 1
		});
}

describe('long layout', () => {
	const lines = (named: (name: string) => string) =>
		ROWS.flatMap((r) =>
			IP_FIELDS.filter(([, value]) => value(r) !== '').map(([name, value]) => `${iso(r.t)},${named(name)},${value(r)}`)
		);

	it('time, point, value', async () => {
		const text = `Timestamp,Point Name,Value\n${lines((n) => n).join('\n')}\n`;
		const got = await readBack([sourceFile('long.csv', text)]);
		expect(got.inspection.layout?.kind).toBe('long');
		expectSeries(got);
	});
	it('with unit, status and point sorted apart', async () => {
		const all = IP_FIELDS.flatMap(([name, value]) => {
			const unit = /\((.*)\)/.exec(name)?.[1] ?? '';
			return ROWS.map(
				(r, i) => `${name.replace(/ \(.*/, '')};${iso(r.t)};${value(r)};${unit};${i === 7 ? 'fault' : 'ok'}`
			);
		});
		const text = `Point;Time;Value;Units;Status\n${all.join('\n')}\n`;
		const got = await readBack([sourceFile('long.csv', text)]);
		expect(got.inspection.layout?.kind).toBe('long');
		expect(got.inspection.decision).toBe('ready');
		expect(got.series('evapSaturation').t).toHaveLength(ROWS.length - 1);
		expect(got.result?.quality.badValues.status).toBeGreaterThan(10);
		expect(got.events.map((e) => e.what)).toEqual(['activation', 'clearing']);
	});
	it('unit and point in two columns', async () => {
		const text = `Time,Equipment,Point,Value\n${ROWS.flatMap((r) => IP_FIELDS.map(([n, v]) => `${iso(r.t)},CH-2,${n},${v(r)}`)).join('\n')}\n`;
		const ctx = context({ siblings: [unitRef('CH-2', 1, 'unit-2')] });
		expectSeries(await readBack([sourceFile('long.csv', text)], ctx), '1', 'unit-2');
	});
});

describe('one signal a file', () => {
	const files = IP_FIELDS.map(([name, value]): [string, string] => [
		`${name.replace(/[/%]/g, '')}.csv`,
		`Time,Value\n${ROWS.map((r) => `${iso(r.t)},${value(r)}`).join('\n')}\n`
	]);
	it('dropped together', async () => {
		const got = await readBack(files.map(([name, text]) => sourceFile(name, text)));
		expect(got.inspection.layout?.kind).toBe('per-signal');
		expectSeries(got);
	});
	it('in a zip with a folder and a note, and nested once', async () => {
		const inner = zipSync(Object.fromEntries(files.map(([name, text]) => [`march/${name}`, Buffer.from(text)])));
		expectSeries(await readBack([sourceFile('points.zip', inner)]));
		const outer = zipSync({ 'points.zip': inner, 'photo.png': Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10) });
		const got = await readBack([sourceFile('all.zip', outer)]);
		expectSeries(got);
		expect(got.inspection.problems.map((p) => p.kind)).toContain('file-skipped');
	});
});

describe('spreadsheets', () => {
	it('xlsx with dates as cells', async () => {
		const book = new ExcelJS.Workbook();
		const sheet = book.addWorksheet('Trend');
		sheet.addRow(['Plant trend']);
		sheet.addRow(['Time', ...IP_FIELDS.map(([name]) => name)]);
		for (const r of ROWS) {
			const wall = new Date(`${iso(r.t).replace(' ', 'T')}Z`);
			const cells = IP_FIELDS.map(([, value]) => (/^-?[\d.]+$/.test(value(r)) ? Number(value(r)) : value(r)));
			sheet.addRow([wall, ...cells]).getCell(1).numFmt = 'yyyy-mm-dd hh:mm:ss';
		}
		const bytes = Buffer.from(await book.xlsx.writeBuffer());
		expectSeries(await readBack([sourceFile('trend.xlsx', bytes)]));
	});
});

describe('Haystack grids', () => {
	const zone = (t: number) => `${iso(t).replace(' ', 'T')}-05:00 New_York`;
	it('Zinc with display names and units', async () => {
		const columns = IP_FIELDS.map(([name], i) => {
			const unit = /\((.*)\)/.exec(name)?.[1];
			return `v${i} dis:"${name.replace(/ \(.*/, '')}"${unit ? ` unit:"${unit}"` : ''}`;
		});
		const cell = (text: string, name: string) => {
			if (name === 'Compressor Running') return text === '1' ? 'T' : 'F';
			if (name === 'Alarm') return text === '' ? '' : `"${text}"`;
			return `${text}${/°F/.test(name) ? '°F' : /%/.test(name) ? '%' : ''}`;
		};
		const rows = ROWS.map((r) => [zone(r.t), ...IP_FIELDS.map(([name, value]) => cell(value(r), name))].join(','));
		const text = `ver:"3.0" dis:"trend"\nts,${columns.join(',')}\n${rows.join('\n')}\n`;
		expectSeries(await readBack([sourceFile('trend.zinc', text)]));
	});
	it('JSON, both forms', async () => {
		const cols = [{ name: 'ts' }, ...IP_FIELDS.map(([name], i) => ({ name: `v${i}`, meta: { dis: name } }))];
		const rows = ROWS.map((r) => ({
			ts: { _kind: 'dateTime', val: zone(r.t).split(' ')[0], tz: 'New_York' },
			...Object.fromEntries(
				IP_FIELDS.map(([, value], i) => [`v${i}`, /^-?[\d.]+$/.test(value(r)) ? Number(value(r)) : value(r)])
			)
		}));
		const grid = { _kind: 'grid', meta: { ver: '3.0' }, cols, rows };
		expectSeries(await readBack([sourceFile('trend.json', JSON.stringify(grid))]));
		const old = {
			meta: { ver: '3.0' },
			cols: [{ name: 'ts' }, ...IP_FIELDS.map(([name], i) => ({ name: `v${i}`, dis: name }))],
			rows: ROWS.map((r) => ({
				ts: `t:${zone(r.t)}`,
				...Object.fromEntries(
					IP_FIELDS.map(([, value], i) => [`v${i}`, /^-?[\d.]+$/.test(value(r)) ? `n:${value(r)}` : value(r)])
				)
			}))
		};
		expectSeries(await readBack([sourceFile('trend.json', JSON.stringify(old))]));
	});
});

describe('headers', () => {
	it('two circuits by name', async () => {
		const fields: Field[] = IP_FIELDS.flatMap(([name, value]): Field[] =>
			/Water|Alarm/.test(name)
				? [[name, value]]
				: [
						[`Circuit 1 ${name}`, value],
						[`Circuit 2 ${name}`, second(value)]
					]
		);
		const got = await readBack(
			[sourceFile('w.csv', wideText(ROWS, fields, iso))],
			context({ unit: unitRef('CH-1', 2) })
		);
		expectSeries(got, '1');
		expectSeries(got, '2', 'unit-1', 0.5);
	});
	it('two circuits by a row of groups', async () => {
		const own = IP_FIELDS.filter(([name]) => !/Water|Alarm/.test(name));
		const shared = IP_FIELDS.filter(([name]) => /Water|Alarm/.test(name));
		const fields = [...shared, ...own, ...own.map(([n, value]): Field => [n, second(value)])];
		const groups = [
			'',
			...shared.map(() => ''),
			'Circuit 1',
			...own.slice(1).map(() => ''),
			'Circuit 2',
			...own.slice(1).map(() => '')
		];
		const got = await readBack(
			[sourceFile('w.csv', `${groups.join(',')}\n${wideText(ROWS, fields, iso)}`)],
			context({ unit: unitRef('CH-1', 2) })
		);
		expectSeries(got, '1');
		expectSeries(got, '2', 'unit-1', 0.5);
	});
	it('two units of the site', async () => {
		const fields: Field[] = IP_FIELDS.flatMap(([name, value]): Field[] => [
			[`CH-1 ${name}`, value],
			[`CH-2 ${name}`, second(value)]
		]);
		const text = wideText(ROWS, fields, iso);
		const got = await readBack([sourceFile('w.csv', text)], context({ siblings: [unitRef('CH-2', 1, 'unit-2')] }));
		expectSeries(got);
		expectSeries(got, '1', 'unit-2', 0.5);
		const alone = await readBack([sourceFile('w.csv', text)]);
		expect(alone.inspection.decision).toBe('needs-mapping');
		expect(alone.inspection.questions.join()).toContain('number 2');
	});
	it('repeated in mid-file', async () => {
		const [header = '', ...lines] = wideText(ROWS, IP_FIELDS, iso).trim().split('\n');
		const got = await readBack([
			sourceFile('w.csv', [header, ...lines.slice(0, 200), header, ...lines.slice(200)].join('\n'))
		]);
		expectSeries(got);
		expect(got.result?.problems).toEqual([]);
	});
	it('columns that come and go between files of one week', async () => {
		const first = wideText(ROWS.slice(0, 288), IP_FIELDS, iso);
		const second = wideText(
			ROWS.slice(288),
			IP_FIELDS.filter(([n]) => !/Oil/.test(n)),
			iso
		);
		const got = await readBack([sourceFile('a.csv', first), sourceFile('b.csv', second)]);
		expectSeries(got);
		expect(got.series('oilTemp').t).toHaveLength(288);
	});
	it('Windows-1252', async () => {
		const bytes = Buffer.from(wideText(ROWS, IP_FIELDS, iso), 'latin1');
		const got = await readBack([sourceFile('w.csv', bytes)]);
		expect(got.inspection.layout?.encoding).toBe('windows-1252');
		expectSeries(got);
	});
});

describe('event histories', () => {
	it('is recognised, and marks what came, went and was acknowledged', async () => {
		const text = [
			'Date/Time,Severity,Description,State',
			'3/4/2025 2:10:00 AM,Critical,Low evaporator saturation shutdown,Active',
			'3/4/2025 2:15:00 AM,Critical,Low evaporator saturation shutdown,Acknowledged',
			'3/4/2025 3:55:00 AM,Critical,Low evaporator saturation shutdown,Cleared',
			'3/14/2025 6:00:00 AM,Warning,Filter due,Active'
		].join('\n');
		const got = await readBack([sourceFile('alarms.csv', text)]);
		expect(got.inspection.decision).toBe('ready');
		expect(got.inspection.files[0]?.kind).toBe('events');
		expect(got.events.map((e) => [new Date(e.at).toISOString().slice(0, 16), e.what, e.severity])).toEqual([
			['2025-03-04T07:10', 'activation', 'trip'],
			['2025-03-04T07:15', 'acknowledgement', 'trip'],
			['2025-03-04T08:55', 'clearing', 'trip'],
			['2025-03-14T10:00', 'activation', 'warning']
		]);
	});
	it('with a code and a time of clearing, beside a trend in one upload', async () => {
		const events =
			'Raised,Code,Message,Cleared\n2025-03-04 02:10:00,17,Circuit 1 low suction trip,2025-03-04 03:55:00\n';
		const got = await readBack([
			sourceFile('trend.csv', wideText(ROWS, SI_FIELDS, iso)),
			sourceFile('events.csv', events)
		]);
		expectSeries(got);
		const history = got.events.filter((e) => e.source === 'history');
		expect(history.map((e) => [e.what, e.code, e.text])).toEqual([
			['activation', '17', 'Circuit 1 low suction trip'],
			['clearing', '17', 'Circuit 1 low suction trip']
		]);
	});
});

describe('change-of-value logs', () => {
	it('are told from interval ones, column by column', async () => {
		const step = (i: number) => 60 + ((i * 7919) % 900);
		let t = FROM;
		const irregular = Array.from({ length: 300 }, (_, i) => {
			t += step(i) * 1000;
			return `${iso(t)},${(44 + Math.sin(i) * 3).toFixed(1)}`;
		});
		const files = [
			sourceFile('Leaving chilled water temp (F).csv', `Time,Value\n${irregular.join('\n')}\n`),
			sourceFile('Compressor running.csv', `Time,Value\n${ROWS.map((r) => `${iso(r.t)},${r.running}`).join('\n')}\n`)
		];
		const got = await readBack(files);
		expect(got.inspection.decision).toBe('ready');
		const logging = Object.fromEntries(got.blocks.map((b) => [b.signal, b.logging]));
		expect(logging).toEqual({ evapWaterOut: 'change', running: 'interval' });
		expect(got.blocks.find((b) => b.signal === 'evapWaterOut')?.increment).toBeCloseTo(0.1 / 1.8, 6);
	});
});

describe('a header that changes in mid-file', () => {
	/** Invented: a minute apart; on from the tenth to the hundredth. */
	const stamp = (i: number) => `2025-03-05 1${Math.floor(i / 60)}:${String(i % 60).padStart(2, '0')}:00`;
	const on = (i: number) => (i > 9 && i < 100 ? 1 : 0);
	const first = ['Time,Compressor Running,Motor Current (A),Leaving Water (°F)'];
	for (let i = 0; i < 60; i++) first.push(`${stamp(i)},${on(i)},${on(i) * (200 + i)},${44 + i / 100}`);
	const amps = Array.from({ length: 120 }, (_, i) => on(i) * (200 + i));

	it('places the columns anew by name, and says so with its line', async () => {
		const second = ['Time,Leaving Water (°F),Compressor Running,Motor Current (A)'];
		for (let i = 60; i < 120; i++) second.push(`${stamp(i)},${44 + i / 100},${on(i)},${on(i) * (200 + i)}`);
		const got = await readBack([sourceFile('w.csv', [...first, ...second].join('\n'))]);
		expect(got.result?.rows).toBe(120);
		expect(got.series('motorCurrent').v).toEqual(amps);
		expect(got.result?.problems).toEqual([expect.objectContaining({ line: 62, kind: 'header-changed' })]);
		expect(got.result?.signals.filter((signal) => signal.signal === 'motorCurrent')).toHaveLength(1);
	});

	it('reads no new column unasked, and names those that came and went', async () => {
		const second = ['Time,Compressor Running,Motor Current (A),Oil Temp (°F)'];
		for (let i = 60; i < 120; i++) second.push(`${stamp(i)},${on(i)},${on(i) * (200 + i)},${100 + i / 10}`);
		const got = await readBack([sourceFile('w.csv', [...first, ...second].join('\n'))]);
		expect(got.series('motorCurrent').v).toEqual(amps);
		expect(got.series('evapWaterOut').v).toHaveLength(60);
		const message = got.result?.problems[0]?.message ?? '';
		expect(message).toMatch(/not read: Oil Temp/);
		expect(message).toMatch(/gone: LeavingWater/);
	});

	it('leaves out what follows when the time has no name there, alike with both readers', async () => {
		const second = ['Compressor Running,Motor Current (A),Leaving Water (°F),When'];
		for (let i = 60; i < 75; i++) second.push(`${on(i)},${on(i) * (200 + i)},${44 + i / 100},${stamp(i)}`);
		for (const reader of ['auto', 'exact'] as const) {
			const got = await readBack([sourceFile('w.csv', [...first, ...second].join('\n'))], context(), reader);
			expect(got.series('motorCurrent').v).toEqual(amps.slice(0, 60));
			expect(got.result?.problems[0]).toMatchObject({ line: 62, kind: 'header-changed' });
			expect(got.result?.problems[0]?.message).toMatch(/left out/);
		}
	});
});

describe('one signal a file with a status', () => {
	it('takes the readings that the status lets count', async () => {
		const rows = Array.from({ length: 60 }, (_, i) => {
			const status = i % 10 === 3 ? 'fault' : i % 10 === 7 ? 'stale' : 'ok';
			return `2025-03-05T10:${String(i).padStart(2, '0')}:00-05:00 New_York,${(44 + i / 100).toFixed(2)}°F,${status}`;
		});
		const got = await readBack([sourceFile('leaving chilled water temp.csv', ['ts,val,status', ...rows].join('\n'))]);
		expect(got.series('evapWaterOut').v).toHaveLength(48);
		expect(got.result?.quality.badValues['status']).toBe(12);
	});
});
