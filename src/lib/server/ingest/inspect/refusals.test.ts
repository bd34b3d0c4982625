import { gzipSync } from 'node:zlib';
import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { sniff } from '../container/sniff';
import { context, readBack, sourceFile } from '../testing/harness';
import type { SourceFile } from '../types';
import { inspectLog } from './inspect-log';

const LOG =
	'Time,Compressor Running,Leaving Water Temp (°F)\n' +
	Array.from(
		{ length: 50 },
		(_, i) => `2025-03-05 10:${String(i).padStart(2, '0')},${i > 9 ? 1 : 0},44.${i % 10}`
	).join('\n') +
	'\n';
const kinds = async (file: SourceFile) => {
	const got = await inspectLog([file], context());
	return [got.decision, ...got.problems.map((p) => p.kind)];
};
/** Bytes of a zip with the encryption flag set in both headers. */
function locked(): Uint8Array {
	const bytes = zipSync({ 'log.csv': Buffer.from(LOG) });
	const view = new DataView(bytes.buffer);
	for (let i = 0; i + 4 < bytes.length; i++) {
		const sign = view.getUint32(i, true);
		if (sign === 0x04034b50) view.setUint16(i + 6, 1, true);
		if (sign === 0x02014b50) view.setUint16(i + 8, 1, true);
	}
	return bytes;
}

describe('refusals', () => {
	it.each([
		['nothing', Buffer.alloc(0), 'empty'],
		['binary junk', Buffer.from(Array.from({ length: 2000 }, (_, i) => (i * 7919) % 256)), 'binary'],
		['a PDF', Buffer.from('%PDF-1.7 …'), 'container'],
		['a picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 1, 2, 3]), 'container'],
		['an old or locked spreadsheet', Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]), 'container'],
		['a web page', Buffer.from('<!DOCTYPE html><html><body>Sign in</body></html>'), 'web-page']
	])('%s is refused by its first bytes', async (_, bytes, kind) => {
		const at = sniff(bytes, 'file');
		expect('refuse' in at && [at.refuse, at.kind]).toEqual([415, kind]);
		expect(await kinds(sourceFile('file', bytes))).toEqual(['refused', kind]);
	});

	it.each([
		['prose', Buffer.from('The chiller was down again this morning,\nand nobody knows why.\n'), 'no-time'],
		['no time column', Buffer.from('a,b,c\n1,2,3\n4,5,6\n'), 'no-time'],
		['blank lines', Buffer.from('\n\n   \n'), 'empty'],
		[
			'no known signal',
			Buffer.from(
				`Date,Product,Price,Sold\n${Array.from({ length: 40 }, (_, i) => `2025-03-${String((i % 28) + 1).padStart(2, '0')} 10:00,Chair,${i}.5,${i * 3}`).join('\n')}\n`
			),
			'no-known-signal'
		],
		['a gzip cut off', gzipSync(LOG.repeat(50)).subarray(0, 300), 'archive-truncated'],
		['a gzip damaged', Buffer.concat([gzipSync(LOG).subarray(0, 60), Buffer.alloc(200, 7)]), 'archive-damaged'],
		['a zip cut off', zipSync({ 'log.csv': Buffer.from(LOG) }).subarray(0, 200), 'archive-truncated'],
		['a zip with a password', locked(), 'archive-password'],
		['a path that leads out', zipSync({ '../../etc/cron.d/x': Buffer.from(LOG) }), 'archive-path'],
		['a full path', zipSync({ '/tmp/x.csv': Buffer.from(LOG) }), 'archive-path'],
		['a zip of nothing but pictures', zipSync({ 'a.png': Uint8Array.of(0x89, 0x50, 0x4e, 0x47) }), 'archive-no-log'],
		[
			'three archives deep',
			zipSync({ 'b.zip': zipSync({ 'c.zip': zipSync({ 'log.csv': Buffer.from(LOG) }) }) }),
			'archive-nested'
		],
		['a broken workbook', zipSync({ 'xl/workbook.xml': Buffer.from('<x/>') }), 'sheet-damaged'],
		['JSON of another shape', Buffer.from('{"hello": [1, 2, 3]}'), 'json-shape'],
		['broken JSON', Buffer.from('[{"time": "2025-03-05 10:00", "a": '), 'json-damaged']
	])('%s is refused with its reason', async (_, bytes, kind) => {
		const got = await kinds(sourceFile('file', bytes));
		expect(got[0]).toBe('refused');
		expect(got).toContain(kind);
	});

	it('a bomb is refused without unpacking it all', async () => {
		const zeros = Buffer.alloc(4 * 1024 * 1024);
		let packed: Uint8Array = gzipSync(Buffer.concat(Array.from({ length: 40 }, () => zeros)));
		expect(await kinds(sourceFile('bomb.csv.gz', packed))).toEqual(['refused', 'binary']);
		const ones = Buffer.alloc(64 * 1024 * 1024 + 9e6, '1,');
		packed = gzipSync(Buffer.concat([Buffer.from(LOG), ones]));
		const before = process.memoryUsage().rss;
		expect((await kinds(sourceFile('bomb.csv.gz', packed)))[1]).toMatch(/archive-bomb|line-too-long/);
		expect(process.memoryUsage().rss - before).toBeLessThan(400e6);
	});

	it('a line without an end is refused with its number', async () => {
		async function* open() {
			yield Buffer.from(LOG);
			for (let i = 0; i < 40; i++) yield Buffer.alloc(100_000, '9');
		}
		const got = await inspectLog([{ name: 'long.csv', size: 4e6, open }], context());
		expect(got.problems).toMatchObject([{ kind: 'line-too-long', line: 52 }]);
	});

	it('a row that cannot be read costs that row only, and is named', async () => {
		const lines = LOG.trim().split('\n');
		lines.splice(20, 0, '2025-03-05 25:99,1,44.0', '2025-03-05 10:19:30,1,44.0,7,8', '=HYPERLINK("x"),1,2');
		const got = await readBack([sourceFile('log.csv', lines.join('\n'))]);
		expect(got.result?.rows).toBe(50);
		expect(got.result?.problems.map((p) => [p.line, p.kind])).toEqual([
			[21, 'row-no-time'],
			[22, 'row-too-long'],
			[23, 'row-no-time']
		]);
	});

	it('cells that are no reading are counted by kind, with their first line', async () => {
		const marks = ['', '---', 'NaN', '-999', '32767', '900', 'abc', '=A1', '12.3 {fault}'];
		const lines = LOG.trim()
			.split('\n')
			.map((line, i) => (i > 10 && i <= 10 + marks.length ? line.replace(/[^,]*$/, marks[i - 11] ?? '') : line));
		const got = await readBack([sourceFile('log.csv', lines.join('\n'))]);
		expect(got.result?.quality.badValues).toEqual({
			blank: 1,
			dashes: 1,
			word: 1,
			sentinel: 2,
			impossible: 1,
			unreadable: 1,
			formula: 1,
			status: 1
		});
		expect(got.result?.problems.find((p) => p.kind === 'value-impossible')).toMatchObject({
			line: 17,
			column: 'Leaving Water Temp (°F)'
		});
		expect(got.series('evapWaterOut').t).toHaveLength(41);
	});
});
