import { expect, it } from 'vitest';
import { hashPassword, passwordFits } from './passwords';

it('hashes with argon2id and tells right from wrong', async () => {
	const stored = await hashPassword('a chill morning');
	expect(stored).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	expect(await passwordFits(stored, 'a chill morning')).toBe(true);
	expect(await passwordFits(stored, 'a chill evening')).toBe(false);
	expect(await passwordFits(null, 'nobody has this password')).toBe(false);
});
