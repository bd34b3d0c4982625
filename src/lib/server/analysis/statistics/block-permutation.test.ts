import { expect, it } from 'vitest';
import { type Block, blockPermutation } from './block-permutation';

const blocks = (tripped: number, clean: number, group: 0 | 1): Block[] => [
	...Array.from({ length: tripped }, () => ({ group, k: 1, m: 1 })),
	...Array.from({ length: clean }, () => ({ group, k: 0, m: 1 }))
];

it("comes near Fisher's exact test when every block is one start", () => {
	// 4 of 4 against 0 of 4: 2/C(8, 4) = 0.0286 (by hand).
	const chance = blockPermutation([...blocks(4, 0, 0), ...blocks(0, 4, 1)], 9999, 3);
	expect(chance).toBeCloseTo(2 / 70, 1.9);
});

it('does not let many starts of one day count as many', () => {
	const days: Block[] = [
		{ group: 0, k: 6, m: 6 },
		{ group: 1, k: 0, m: 6 }
	];
	expect(blockPermutation(days, 99)).toBe(1);
});

it('cannot compare with an empty group', () => {
	expect(blockPermutation(blocks(2, 2, 0))).toBeNull();
});
