import ExcelJS from 'exceljs';
import { describe, expect, it } from 'vitest';
import { context, readBack, sourceFile } from '../testing/harness';

async function book(fill: (sheet: ExcelJS.Worksheet) => void): Promise<Buffer> {
	const workbook = new ExcelJS.Workbook();
	const sheet = workbook.addWorksheet('Log');
	sheet.addRow(['Time', 'Compressor Running', 'Motor Current (A)', 'Leaving Water (°F)']);
	fill(sheet);
	return Buffer.from(await workbook.xlsx.writeBuffer());
}

/** Invented rows: a minute apart, on from the fifth. */
function rows(sheet: ExcelJS.Worksheet, water: (i: number) => ExcelJS.CellValue): void {
	for (let i = 0; i < 20; i++) {
		const row = sheet.addRow([new Date(Date.UTC(2025, 2, 5, 10, i)), i > 4 ? 1 : 0, i > 4 ? 200 + i : 0, water(i)]);
		row.getCell(1).numFmt = 'yyyy-mm-dd hh:mm';
	}
}

describe('spreadsheets', () => {
	it('takes a formula by the value it last had', async () => {
		const bytes = await book((sheet) => rows(sheet, (i) => ({ formula: `44+${i}/10`, result: 44 + i / 10 })));
		const got = await readBack([sourceFile('log.xlsx', bytes)]);
		expect(got.inspection.decision).toBe('ready');
		expect(got.series('evapWaterOut').v).toHaveLength(20);
	});
	it('counts a formula without a value, or with an error, as no reading', async () => {
		const bytes = await book((sheet) =>
			rows(sheet, (i) => (i === 3 ? { formula: '1+1' } : i === 4 ? { error: '#DIV/0!' } : 44 + i / 10))
		);
		const got = await readBack([sourceFile('log.xlsx', bytes)]);
		expect(got.inspection.problems).toEqual([]);
		expect(got.inspection.decision).toBe('ready');
		expect(got.series('evapWaterOut').v).toHaveLength(18);
	});
	it('joins a day column and a clock column', async () => {
		const bytes = await book((sheet) => {
			sheet.spliceRows(1, 1, ['Date', 'Clock', 'Compressor Running', 'Motor Current (A)', 'Leaving Water (°F)']);
			for (let i = 0; i < 20; i++) {
				const row = sheet.addRow([
					new Date(Date.UTC(2025, 2, 5)),
					(600 + i) / 1440,
					i > 4 ? 1 : 0,
					i > 4 ? 200 + i : 0,
					44 + i / 10
				]);
				row.getCell(1).numFmt = 'dd/mm/yyyy';
				row.getCell(2).numFmt = 'hh:mm:ss';
			}
		});
		const got = await readBack([sourceFile('log.xlsx', bytes)], context({ timeZone: 'UTC' }));
		expect(got.inspection.questions).toEqual([]);
		expect(new Date(got.series('evapWaterOut').t[5] ?? 0).toISOString()).toBe('2025-03-05T10:05:00.000Z');
	});
});
