import { expect, it } from 'vitest';
import type { SeriesMap } from '$lib/model/series';
import { shownNature } from './nature-shown';

// Invented columns; what they show is common practice, no source.
const column = { t: Float64Array.from([0]), v: Float64Array.from([12]), logging: 'interval' as const };
const shown = (series: SeriesMap, nature = {}) => shownNature({ series, nature });

it('fills in what the columns show', () => {
	expect(shown({ condWaterIn: column, valvePosition: column })).toEqual({
		condenser: 'water',
		metering: 'electronic-valve'
	});
	expect(shown({ condAirIn: column, evapLevel: column })).toEqual({ condenser: 'air', evaporator: 'flooded' });
});

it('keeps what was given, and does not guess from an empty column', () => {
	expect(shown({ condWaterIn: column }, { condenser: 'evaporative' })).toEqual({ condenser: 'evaporative' });
	expect(shown({ condWaterIn: { ...column, v: Float64Array.from([NaN]) } })).toEqual({});
});
