import { describe, expect, it } from 'vitest';
import { readBack, sourceFile } from '../testing/harness';
import { legacyEncoding } from './legacy';

const ascii = (text: string): number[] => [...text].map((c) => c.charCodeAt(0));
/** Windows-1251: А is C0 and the letters follow in order (its code page table). */
const cyrillic = (text: string): number[] =>
	[...text].map((c) => (c >= 'А' && c <= 'я' ? c.charCodeAt(0) - 0x410 + 0xc0 : c.charCodeAt(0)));

describe('legacyEncoding', () => {
	it('is Windows-1252 for degrees, cubes and umlauts', () => {
		// "Zulauf Kälte °C;Durchfluß m³/h;Öltemp. °C"
		const bytes = [...ascii('Zulauf K'), 0xe4, ...ascii('lte '), 0xb0, ...ascii('C;Durchflu'), 0xdf, ...ascii(' m')];
		bytes.push(0xb3, ...ascii('/h;'), 0xd6, ...ascii('ltemp. '), 0xb0, ...ascii('C'));
		expect(legacyEncoding(Uint8Array.from(bytes))).toBe('windows-1252');
	});
	it('is Windows-1251 for words of Cyrillic letters', () => {
		const bytes = cyrillic('Время;Температура масла;Давление');
		expect(legacyEncoding(Uint8Array.from([...bytes, 0xb0]))).toBe('windows-1251');
	});
	it('is Shift JIS for kana', () => {
		// 温度センサー: 89 B7, 93 78, 83 5A, 83 93, 83 54, 81 5B (JIS X 0208 in its shifted form)
		const bytes = [0x89, 0xb7, 0x93, 0x78, 0x83, 0x5a, 0x83, 0x93, 0x83, 0x54, 0x81, 0x5b, ...ascii(',1\n')];
		expect(legacyEncoding(Uint8Array.from(bytes))).toBe('shift_jis');
	});
	it('is of DOS when degree signs are all there is', () => {
		expect(legacyEncoding(Uint8Array.from([...ascii('Water '), 0xf8, ...ascii('F')]))).toBe('ibm850');
		expect(legacyEncoding(Uint8Array.from([...ascii('K'), 0xf8, ...ascii('ling')]))).toBe('windows-1252');
	});
});

it('reads a DOS degree as one', async () => {
	const rows = Array.from(
		{ length: 60 },
		(_, i) => `2025-03-05 10:${String(i).padStart(2, '0')},${i > 9 ? 1 : 0},${44 + i / 100}`
	);
	const head = [...ascii('Time,Compressor Running,Leaving Chilled Water Temp '), 0xf8, ...ascii('F\n')];
	const got = await readBack([sourceFile('w.csv', Uint8Array.from([...head, ...ascii(rows.join('\n'))]))]);
	expect(got.inspection.layout?.encoding).toBe('ibm850');
	expect(got.inspection.mapping.find((m) => m.signal === 'evapWaterOut')).toMatchObject({
		column: 'Leaving Chilled Water Temp °F',
		unitOfMeasure: 'degF'
	});
	expect(got.series('evapWaterOut').v).toHaveLength(60);
});
