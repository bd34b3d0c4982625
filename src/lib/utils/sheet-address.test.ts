import { describe, expect, it } from 'vitest';
import { readSheetAddress, type SheetAddress, writeSheetAddress } from './sheet-address';

const id = '0d1e2f30-4151-4617-8a9b-acbdcedf0011';
const other = '0d1e2f30-4151-4617-8a9b-acbdcedf0022';

describe('the address of a start sheet', () => {
	it('comes back as it was written', () => {
		const view: SheetAddress = { window: { from: -12.5, to: 90 }, cursor: 31, ghost: id, with: [other] };
		const query = writeSheetAddress(new URLSearchParams('circuit=2&from=9'), view);
		expect(query.get('circuit')).toBe('2');
		expect(readSheetAddress(query)).toEqual(view);
	});
	it('says nothing for the home view', () => {
		const home: SheetAddress = { window: null, cursor: null, ghost: null, with: [] };
		expect(writeSheetAddress(new URLSearchParams('at=5&ghost=none'), home).toString()).toBe('');
		expect(readSheetAddress(new URLSearchParams())).toEqual(home);
	});
	it('leaves out what makes no sense', () => {
		const read = readSheetAddress(new URLSearchParams('from=90&to=10&at=soon&ghost=../x&with=a,b'));
		expect(read).toEqual({ window: null, cursor: null, ghost: null, with: [] });
	});
	it('keeps a sheet without a ghost', () => {
		expect(readSheetAddress(new URLSearchParams('ghost=none')).ghost).toBe('none');
	});
});
