import { describe, expect, it } from 'vitest';
import type { Start } from '$lib/model/wire/start';
import {
	figureText,
	figureUnit,
	figuresWithValues,
	filterStarts,
	sortStarts,
	startsCsv,
	startsTitle
} from './start-columns';

// Invented starts.
function start(id: string, over: Partial<Start> = {}): Start {
	return {
		id,
		unitId: 'u',
		circuit: '1',
		source: 'log',
		startedAt: `2026-05-0${id}T05:00:00Z`,
		endedAt: `2026-05-0${id}T06:00:00Z`,
		uncertaintySeconds: 5,
		endUncertaintySeconds: 5,
		spacingSeconds: 5,
		outcome: 'held',
		outcomeReason: '',
		startupTrip: false,
		firstStart: true,
		restSeconds: 40_000,
		restAtLeast: false,
		layUp: false,
		episode: null,
		tryNumber: 1,
		attended: false,
		othersRunning: 0,
		trip: null,
		stall: null,
		settled: null,
		holes: [],
		runningFrom: 'running',
		notes: [],
		figures: {},
		absent: {},
		absentReasons: {},
		marks: {},
		corrected: null,
		methodVersion: '1',
		units: {},
		...over
	};
}
const starts = [
	start('1', { figures: { minEvapSaturation: 4 } }),
	start('2', {
		figures: { minEvapSaturation: null },
		outcome: 'tripped',
		startupTrip: true,
		firstStart: false,
		tryNumber: 2
	}),
	start('3', { figures: { minEvapSaturation: -3 } })
];
const ids = (list: readonly Start[]) => list.map((one) => one.id).join('');

describe('sortStarts', () => {
	it('keeps absent values last, whichever way', () => {
		expect(ids(sortStarts(starts, { key: 'minEvapSaturation', down: false }))).toBe('312');
		expect(ids(sortStarts(starts, { key: 'minEvapSaturation', down: true }))).toBe('132');
	});
	it('puts the newest first when asked', () => {
		expect(ids(sortStarts(starts, { key: 'startedAt', down: true }))).toBe('321');
	});
});

describe('filterStarts', () => {
	it('knows outcome, first starts and tries', () => {
		expect(ids(filterStarts(starts, { outcome: 'tripped', only: '' }))).toBe('2');
		expect(ids(filterStarts(starts, { outcome: '', only: 'first' }))).toBe('13');
		expect(ids(filterStarts(starts, { outcome: '', only: 'first-tries' }))).toBe('13');
		expect(ids(filterStarts(starts, { outcome: 'held', only: 'startup-trips' }))).toBe('');
	});
});

describe('figures of the table', () => {
	it('shows only columns that some start has', () => expect(figuresWithValues(starts)).toEqual(['minEvapSaturation']));
	it('prints sign, decimals and unit by quantity', () => {
		expect(figureText('headroom.evapSaturation', 2.34, {})).toBe('+2.3');
		expect(figureText('minEvapSaturation', -3, {})).toBe('−3.0');
		expect(figureText('secondsBelowCutout', 12, {})).toBe('12\u00a0s');
		expect(figureText('minOilNet', 210.4, { pressureDifference: 'kPa' })).toBe('210');
		expect(figureText('minOilNet', 30.44, { pressureDifference: 'psi' })).toBe('30.4');
		expect(figureUnit('minEvapSaturation', { temperature: '°C' })).toBe('°C');
	});
});

describe('startsTitle', () => {
	it('says what the starts say', () => {
		expect(startsTitle([])).toBe('No start in this period');
		expect(startsTitle([starts[0] ?? start('1')])).toBe('None of 1 starts tripped');
		expect(startsTitle(starts)).toBe('1 of 3 starts tripped, each inside the start-up window');
	});
});

describe('startsCsv', () => {
	it('names units in the header and leaves absent figures empty', () => {
		const lines = startsCsv(starts, { temperature: '°C' }).split('\r\n');
		expect(lines[0]).toContain('"Evap. saturation, least, °C"');
		expect(lines).toHaveLength(5);
		expect(lines[2]).toContain(',tripped,,,yes,no,2,no,trend log,40000,5,5,');
	});
});
