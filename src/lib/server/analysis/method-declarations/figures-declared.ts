import { FIGURE_KEYS, type FigureKey } from '$lib/model/start';
import { FIGURE_WORDS } from '$lib/model/words';
import type { MethodEntry, MethodSection } from './types';

const SETTLED = 'median over the settled stretch';
const HEADROOM = 'least distance to the protection, from the end of the bypass to ten minutes';

/** How each figure is read: its window and what is taken in it. Seconds count from the start. */
const READ: Readonly<Record<FigureKey, string>> = {
	startCapacity:
		'median of 45 to 120 s; a shorter run: 10 s to its stop, marked early; coarse spacing: the first row, marked',
	startAmps: 'as capacity at start, and not before the starter’s transition + 10 s (45 s where it is not known)',
	peakCapacity: 'most, from the start to 30 s before the stop',
	timeTo50Seconds: 'first time at 50 %',
	timeTo75Seconds: 'first time at 75 %',
	timeTo90Seconds: 'first time at 90 %',
	timeToPeakSeconds: 'first time at the most',
	minEvapSaturation: 'least, from 5 s to the stop; between samples it may have been lower',
	minEvapSaturationAtSeconds: 'when that least value stood',
	steepestFall: 'steepest slope of saturation over any 30 s of the start-up window, two samples at least',
	secondsBelowCutout: 'time below the cut-out after the bypass; absent over a spacing of 15 s',
	degreeSecondsBelowCutout: 'depth times time below the cut-out, by trapezoids; absent over a spacing of 15 s',
	recoverySeconds: 'time from the least saturation back over the cut-out',
	evapApproach: SETTLED,
	condApproach: SETTLED,
	superheat: SETTLED,
	settledDischargeSuperheat: SETTLED,
	settledSubcooling: SETTLED,
	settledMargin: SETTLED,
	settledCapacity: SETTLED,
	settledLift: SETTLED,
	settledOilTemp: SETTLED,
	settledSeconds: 'length of the settled stretch',
	evapDelta: SETTLED,
	flow: SETTLED,
	duty: SETTLED,
	powerPerDuty: 'electrical power over duty, ' + SETTLED,
	minSuperheat: 'least, from 60 s to the stop',
	minDischargeSuperheat: 'least, from 60 s to the stop',
	minMargin: 'least, from 60 s to the stop (10 s in a run under 90 s)',
	maxMargin: 'most, from 60 s to the stop (10 s in a run under 90 s)',
	marginSlope: 'Theil–Sen slope from 5 to 20 min',
	oilTempSlope: 'Theil–Sen slope from 5 to 20 min',
	maxOilTemp: 'most, start to stop',
	maxCondSaturation: 'most, start to stop',
	maxValvePosition: 'most, start to stop',
	meanValvePosition: 'mean over time, start to stop',
	secondsAtValveLimit: 'time with the valve fully open',
	systemDeltaAt30s: 'value at 30 s, nearest sample within one spacing',
	systemDeltaAt60s: 'value at 60 s, nearest sample within one spacing',
	liftAtStart: 'value at 60 s, nearest sample within one spacing',
	minOilNet: 'least, from 30 s to the stop',
	oilTempAtStart: 'last sample before the start',
	waterOutAtStart: 'last sample before the start',
	oilLiftAtStart: 'oil over evaporator saturation, last sample before; only after half an hour of rest',
	condWaterInAtStart: 'median from 60 s before to 60 s after',
	outdoorAtStart: 'median from 60 s before to 60 s after',
	pullDownRate: 'Theil–Sen slope of leaving water from 1 to 5 min',
	'headroom.evapSaturation': HEADROOM,
	'headroom.suctionPressure': HEADROOM,
	'headroom.leavingWater': HEADROOM,
	'headroom.condSaturation': HEADROOM,
	'headroom.condPressure': HEADROOM,
	'headroom.dischargeTemp': HEADROOM,
	'headroom.oilTemp': HEADROOM,
	'headroom.oilNet': HEADROOM,
	'headroom.systemDelta': HEADROOM,
	'headroom.margin': HEADROOM,
	'headroom.windingTemp': HEADROOM
};

const entries: MethodEntry[] = FIGURE_KEYS.filter((key) => !key.startsWith('headroom.')).map((key) => ({
	name: FIGURE_WORDS[key],
	says: READ[key],
	origin: 'ours' as const
}));

/** Every figure of a start with its window; a figure that cannot be had says why instead. */
export const FIGURES_SECTION: MethodSection = {
	key: 'figures',
	title: 'Figures of a start',
	lead: 'Settled is the longest stretch of five minutes or more that begins after ten minutes and ends 30 s before the stop, with capacity moving under a point a minute and leaving water under 0.1 K a minute. A figure that cannot be had says why: signal missing, gap, run too short, spacing too coarse, does not apply.',
	entries: [...entries, { name: 'Headroom of each protection', says: HEADROOM, origin: 'ours' }]
};

/** The window of one figure. */
export const readingOf = (key: FigureKey): string => READ[key];
