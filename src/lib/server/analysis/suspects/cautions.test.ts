import { expect, it } from 'vitest';
import { CAUTIONS, cautionsFor } from './cautions';

it('puts qualified people first on every check', () => {
	expect(cautionsFor('freeze')).toEqual([CAUTIONS.qualified, CAUTIONS.freeze]);
});

it('names laws and standards exactly', () => {
	expect(CAUTIONS.remoteStart).toContain('29 CFR 1910.147');
	expect(CAUTIONS.refrigerant).toContain('40 CFR 82 Subpart F');
	expect(CAUTIONS.electrical).toContain('NFPA 70E');
});
