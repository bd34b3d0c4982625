import { describe, expect, it } from 'vitest';
import type { Start } from '$lib/model/wire/start';
import { outcomeFigure } from './outcome-figures';

const start = (id: string, outcome: Start['outcome'], startCapacity: number | null, attended = false) =>
	({ id, outcome, attended, figures: { startCapacity } }) as unknown as Start;

describe('outcomeFigure', () => {
	it('lays tripped and held starts along the suspect’s figure, attended and unknown ones left out', () => {
		const starts = [
			start('a', 'tripped', 62),
			start('b', 'held', 44),
			start('c', 'held', null),
			start('d', 'held', 45, true),
			start('e', 'lost', 45)
		];
		expect(outcomeFigure('slide-not-unloading', starts)).toEqual({
			figure: 'startCapacity',
			points: [
				{ id: 'a', value: 62, tripped: true },
				{ id: 'b', value: 44, tripped: false }
			]
		});
	});
	it('needs both kinds, and a figure for the suspect', () => {
		expect(outcomeFigure('slide-not-unloading', [start('a', 'tripped', 62)])).toBeNull();
		expect(outcomeFigure('non-condensables', [start('a', 'tripped', 62), start('b', 'held', 4)])).toBeNull();
	});
});
