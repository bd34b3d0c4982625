import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Dictionary, type RowPlan } from './row-plan';
import { readRows, type ReaderChoice } from './row-reader';

const PLAN: RowPlan = {
	delimiter: ',',
	decimal: '.',
	width: 4,
	time: { column: 0, clockColumn: -1, order: 'ymd', year: null },
	numbers: [1, 2],
	words: [3, 2]
};

async function read(text: string, reader: ReaderChoice, size: number, plan = PLAN, dataLine = 1) {
	const bytes = Buffer.from(text, 'utf8');
	async function* pieces() {
		for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
	}
	const dictionaries = plan.words.map(() => new Dictionary());
	const rows: unknown[] = [];
	const handler = {
		row: (v: {
			line: number;
			wall: number;
			offset: number;
			numbers: Float64Array;
			bad: Uint8Array;
			words: Int32Array;
		}) =>
			void rows.push([
				v.line,
				v.wall,
				v.offset,
				[...v.numbers],
				[...v.bad],
				[...v.words].map((c, i) => dictionaries[i]?.list[c])
			]),
		odd: (line: number, _text: string, why: string) => void rows.push([line, why])
	};
	for await (const _ of readRows(pieces(), plan, dataLine, handler, dictionaries, reader)) void _;
	return rows;
}

const cell = fc.oneof(
	fc.double({ min: -1e6, max: 1e6, noNaN: true }).map((x) => x.toFixed(2)),
	fc.integer({ min: -99999, max: 99999 }).map(String),
	fc.double({ noNaN: true, noDefaultInfinity: true }).map(String),
	fc.constantFrom(
		'',
		' ',
		'---',
		'NaN',
		'1,234.5',
		'"1,234"',
		'72.3 °F',
		'"7""2"',
		'=A1',
		' 44.1 ',
		'+3',
		'-',
		'.5',
		'5.',
		'1e3',
		'"quoted"',
		'on'
	)
);
const stamp = fc.oneof(
	fc
		.integer({ min: 0, max: 1e6 })
		.map((s) => new Date(1.74e12 + s * 1000).toISOString().slice(0, 19).replace('T', ' ')),
	fc.constantFrom(
		'2025-03-05T13:00:05Z',
		'2025-03-05 13:00:05.25',
		'',
		'total',
		'"2025-03-05 13:00"',
		'2025-02-31 10:00'
	)
);
const word = fc.constantFrom('on', 'off', '', 'Läuft', '"a,b"', '"two\nlines"', '"say ""x"""', 'a "b"');
const row = fc.tuple(stamp, cell, cell, word).map((cells) => cells.join(','));
const lines = fc.array(
	fc.oneof(
		{ weight: 9, arbitrary: row },
		{
			weight: 1,
			arbitrary: fc.constantFrom(
				'',
				'x',
				'2025-03-05 10:00,1',
				',,,',
				'2025-03-05 10:00,1,2,on,5',
				'2025-03-05 10:00,1,2,on,,'
			)
		}
	),
	{ maxLength: 40 }
);

/** Only one column in the middle is wanted: what stands behind it is passed over, unless it is too much. */
const FEW: RowPlan = { ...PLAN, numbers: [1], words: [] };

describe('readRows', () => {
	it('passes over columns that nobody wants as the exact reader does', async () => {
		const plain = fc.constantFrom('', '1', '2.25', 'on', ' ', '123456789.125');
		const any = fc.array(
			fc.oneof(
				fc.array(plain, { maxLength: 7 }).map((cells) => ['2025-03-05 10:00', ...cells].join(',')),
				row
			),
			{
				maxLength: 30
			}
		);
		await fc.assert(
			fc.asyncProperty(any, fc.constantFrom('\n', '\r\n'), fc.integer({ min: 1, max: 200 }), async (all, eol, size) => {
				const text = all.join(eol);
				expect(await read(text, 'auto', size, FEW)).toEqual(await read(text, 'exact', 10_000, FEW));
			})
		);
	});

	it('reads alike with the scanner and with PapaParse, however the bytes are cut', async () => {
		await fc.assert(
			fc.asyncProperty(
				lines,
				fc.constantFrom('\n', '\r\n'),
				fc.boolean(),
				fc.integer({ min: 1, max: 300 }),
				async (all, eol, open, size) => {
					const text = all.join(eol) + (open ? '' : eol);
					expect(await read(text, 'auto', size)).toEqual(await read(text, 'exact', 1 << 20));
				}
			),
			{ numRuns: 300 }
		);
	});
	it('reads numbers as a full parser does', async () => {
		await fc.assert(
			fc.asyncProperty(
				fc.double({ min: -1e9, max: 1e9, noNaN: true }),
				fc.integer({ min: 0, max: 12 }),
				async (x, places) => {
					const text = x.toFixed(places);
					const [got] = (await read(`2025-03-05 10:00,${text},,\n`, 'auto', 64)) as [
						number,
						number,
						number,
						number[]
					][];
					expect(got?.[3][0]).toBe(Number(text));
				}
			)
		);
	});
	it('joins a date and a clock from two columns', async () => {
		const plan: RowPlan = {
			...PLAN,
			width: 3,
			time: { column: 0, clockColumn: 1, order: 'dmy', year: null },
			numbers: [2],
			words: []
		};
		const [got] = (await read('05.03.2025,1:00 PM,44.2\n', 'auto', 64, plan)) as [number, number][];
		expect(got?.[1]).toBe(Date.UTC(2025, 2, 5, 13));
	});
	it('begins at the data line and counts lines from the top', async () => {
		const rows = (await read('title\nheader\n2025-03-05 10:00,1,2,on\n', 'auto', 5, PLAN, 3)) as [number][];
		expect(rows.map((r) => r[0])).toEqual([3]);
	});
});
