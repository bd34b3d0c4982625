import { expect, it } from 'vitest';
import { parseConfig } from './config';

const base = { DATABASE_URL: 'postgres://u:p@127.0.0.1:1/x' };

it('names every wrong variable', () => {
	expect(() => parseConfig({ DATABASE_URL: 'mysql://x', ORIGIN: 'nowhere' })).toThrow(/DATABASE_URL.*ORIGIN/);
});

it('takes blank as missing, and DEMO=off as off', () => {
	expect(parseConfig({ ...base, ORIGIN: '' }).ORIGIN).toBeUndefined();
	expect(parseConfig({ ...base, DEMO: 'off' }).DEMO).toBe(false);
	expect(parseConfig(base).DEMO).toBe(true);
});
