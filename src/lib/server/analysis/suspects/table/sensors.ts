import type { FieldCheckFact } from '$lib/model/checks';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { checkClue, recent } from '../clue-builders';
import { always, type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { restOffset, suctionOffset } from '../rest-readings';
import { ramp } from '../strength';
import { latestCheck } from './shared';

/** From logs alone paired sensors speak only over 3 °F (1.7 K); on a bench 2 °F (1.1 K) is the tolerance (practice). */
const LOG_TOLERANCE = 1.7;

const pressureGap = (context: Context) =>
	context.pressureGap(context.starts, 60, 900) ?? context.pressureGap(context.starts, 10, 120);

/** The gap between pressure and saturation is a sensor's only when it is as large at light load as at full. */
const gapIsSteady = (context: Context) => {
	const early = context.pressureGap(context.starts, 0, 40);
	const late = context.pressureGap(context.starts, 60, 900);
	return !early || !late || Math.abs(early.value - late.value) < 1.2;
};

const saturationAgainstPressure: ClueRule = {
	key: 'saturation-off-its-pressure',
	direction: 'for',
	weight: 1,
	discriminates: true,
	needs: ['evapSaturation', 'evapPressure'],
	read: (context) => {
		const gap = pressureGap(context);
		if (!gap) return null;
		return {
			strength: gapIsSteady(context) ? ramp(Math.abs(gap.value), 0.9, 1.9) : 0,
			sentence: `Logged saturation stands ${context.words.difference(-gap.value)} off that of the logged pressure, median of ${countWords(gap.starts.length, 'start')}.`,
			figures: { gap: gap.value },
			starts: gap.starts.slice(-5),
			show: { signals: ['evapSaturation', 'evapPressure'], from: 0, to: 900 }
		};
	}
};

const saturationAtRest: ClueRule = {
	key: 'saturation-off-the-water-at-rest',
	readAt: 'rest',
	direction: 'for',
	weight: 0.9,
	discriminates: true,
	needs: ['evapSaturation', 'evapWaterOut'],
	read: (context) => {
		const rest = restOffset(context, 'logged');
		if (!rest) return null;
		const steady = ramp(rest.spread, 1, 0.4);
		return {
			strength: ramp(Math.abs(rest.value), LOG_TOLERANCE - 0.5, LOG_TOLERANCE + 0.5) * steady * (rest.proved ? 1 : 0.6),
			sentence: `At rest the logged saturation stands ${context.words.difference(rest.value)} off the leaving water${rest.proved ? '' : ' (no pump or flow logged)'}, over ${countWords(rest.rests.length, 'rest')}.`,
			figures: { offset: rest.value, spread: rest.spread, rests: rest.rests.length },
			starts: rest.rests.slice(-5),
			show: { signals: ['evapSaturation', 'evapWaterOut', 'evapWaterIn'], from: -1200, to: 0 }
		};
	}
};

const sensorCheck = (signals: readonly string[]) => (check: FieldCheckFact) =>
	check.kind === 'sensor' && signals.includes(check.signal) ? check : null;

const sensorFound = (signals: readonly string[], direction: 'for' | 'against', label: string): ClueRule =>
	checkClue(`${label}-sensor-${direction === 'for' ? 'off' : 'good'}`, direction, (context) => {
		const check = latestCheck(context, sensorCheck(signals));
		if (!check) return null;
		const off = Math.abs(check.displayed - check.reference);
		const tolerance = check.toleranceK ?? context.limit('pairedSensorTolerance') ?? 1.11;
		const strength =
			direction === 'for' ? ramp(off, 0.9 * tolerance, 1.2 * tolerance) : ramp(off, tolerance, 0.8 * tolerance);
		const sentence = `Displayed ${context.words.temperature(check.displayed)} against ${context.words.temperature(check.reference)} on the reference.`;
		return { at: check.at, half: check.indicative, strength, sentence };
	});

export const evapSaturationSensor: SuspectRow = {
	key: 'evap-saturation-sensor',
	family: 'real',
	applies: always,
	clues: [
		saturationAgainstPressure,
		saturationAtRest,
		{
			...saturationAgainstPressure,
			key: 'pressure-agrees',
			direction: 'against',
			weight: 0.5,
			discriminates: false,
			read: (context) => {
				const gap = pressureGap(context);
				if (!gap) return null;
				// Two columns that agree to the hundredth are one reading shown twice: no second witness.
				if (Math.max(...gap.values.map(Math.abs)) < 0.05) return SILENT;
				// Off the water at rest with its own pressure agreeing: both come from the one transducer that is off.
				const rest = restOffset(context, 'logged');
				const together = rest?.proved ? ramp(Math.abs(rest.value), LOG_TOLERANCE + 0.5, LOG_TOLERANCE - 0.5) : 1;
				return {
					strength: together * ramp(Math.abs(gap.value), 0.8, 0.4),
					sentence: `Saturation of the logged pressure agrees within ${context.words.difference(Math.abs(gap.value))}.`,
					figures: { gap: gap.value },
					starts: gap.starts.slice(-5)
				};
			}
		},
		{
			...saturationAtRest,
			key: 'agrees-at-rest',
			direction: 'against',
			weight: 0.5,
			discriminates: false,
			read: (context) => {
				const rest = restOffset(context, 'logged');
				if (!rest?.proved) return rest ? SILENT : null;
				return {
					strength: ramp(Math.abs(rest.value), 1, 0.5),
					sentence: `At rest the logged saturation agrees with the water within ${context.words.difference(Math.abs(rest.value))}.`,
					figures: { offset: rest.value },
					starts: rest.rests.slice(-5)
				};
			}
		},
		sensorFound(['evapSaturation', 'evapPressure'], 'for', 'saturation'),
		sensorFound(['evapSaturation', 'evapPressure'], 'against', 'saturation')
	],
	showsWithoutSymptom: true,
	check: {
		key: 'saturation-sensor',
		title:
			'Calibrated gauge and thermometer against the display at the same second; seating; resistance at a known temperature.',
		tools: ['calibrated gauge', 'reference thermometer', 'saturation table', 'meter'],
		cautions: cautionsFor('freeze', 'protections', 'refrigerant'),
		unitOff: false
	}
};

/** Superheat an evaporator usually settles at, K: the middle of what the trade sets (practice), by kind. */
const usualSuperheat = (context: Context): number => {
	const low = context.limit('superheatUsualLow');
	const high = context.limit('superheatUsualHigh');
	if (low !== null && high !== null) return (low + high) / 2;
	return context.nature.evaporator === 'dx' ? 5 : 1.5;
};

/** How little the air can have cooled a resting suction pipe, 0…1; `air` is the air minus saturation, K. */
const notByColdAir = (air: number | null): number => (air === null ? 0.7 : ramp(air, -2, 0));

/**
 * Suction minus saturation at rest is no witness by itself (a pipe takes the room's temperature); it is one when every
 * settled run is off by the same amount to the same side, and the approach does not follow.
 */
const suctionOffAtRestToo: ClueRule = {
	key: 'off-at-rest-and-in-runs',
	direction: 'for',
	weight: 0.65,
	discriminates: true,
	readAt: 'rest',
	needs: ['superheat', 'evapApproach'],
	read: (context) => {
		const rest = suctionOffset(context);
		const runs = context.figure('superheat', recent(context, 'superheat'));
		const approach = context.atFullLoad('evapApproach', recent(context, 'evapApproach'));
		if (!rest || !runs) return null;
		const off = runs.value - usualSuperheat(context);
		// A pipe in warmer air stands over the evaporator by itself, and under it in colder air: only what the air cannot
		// do is left to the sensor.
		const overAir = rest.air === null || rest.air > rest.value - 1 ? 0.6 : 1;
		const byAir = rest.value > 0 ? overAir : notByColdAir(rest.air);
		const together = Math.sign(off) === Math.sign(rest.value) ? Math.min(Math.abs(off), Math.abs(rest.value)) : 0;
		const wide = context.nature.evaporator === 'dx' ? 9 : 4;
		// Wet gas is no sensor's doing: a low superheat must go with a dry discharge, where that is logged.
		const discharge = context.figure('settledDischargeSuperheat', recent(context, 'settledDischargeSuperheat'));
		const dry = off > 0 || !discharge ? 1 : ramp(discharge.value, 6, 12);
		return {
			strength:
				byAir *
				dry *
				ramp(together, 1.4, 2.2) *
				ramp(rest.spread, 1, 0.5) *
				(approach ? ramp(approach.value, wide * 1.2, wide) : 1),
			sentence: `Suction stands ${context.words.difference(rest.value)} off saturation at rest, and settled superheat is ${context.words.difference(runs.value)}, off the usual to the same side.`,
			figures: { atRest: rest.value, superheat: runs.value },
			starts: runs.starts.slice(-5),
			show: { signals: ['suctionTemp', 'evapSaturation'], from: -1200, to: 1800 }
		};
	}
};

/** Nothing at rest is colder than both the evaporator and the air about it: a suction that reads so reads low. */
const suctionColdAtRest: ClueRule = {
	key: 'colder-than-saturation-at-rest',
	direction: 'for',
	weight: 0.6,
	discriminates: true,
	readAt: 'rest',
	needs: ['superheat'],
	read: (context) => {
		const rest = suctionOffset(context);
		if (!rest) return null;
		return {
			strength:
				ramp(rest.value, -LOG_TOLERANCE + 0.3, -LOG_TOLERANCE - 0.5) *
				ramp(rest.spread, 1.5, 0.8) *
				notByColdAir(rest.air),
			sentence: `At rest suction stands ${context.words.difference(-rest.value)} under evaporator saturation, which nothing there could cool it to.`,
			figures: { atRest: rest.value },
			starts: context.starts.slice(-5),
			show: { signals: ['suctionTemp', 'evapSaturation', 'outdoorTemp'], from: -1200, to: 0 }
		};
	}
};

/** Gas that leaves wet cools the discharge: no superheat under a dry discharge is the sensor's reading, not the gas's. */
const superheatGoneButDry: ClueRule = {
	key: 'superheat-gone-but-discharge-dry',
	direction: 'for',
	weight: 0.5,
	discriminates: true,
	readAt: 'run',
	needs: ['superheat', 'dischargeSuperheat'],
	applies: natureIs('evaporator', 'dx'),
	read: (context) => {
		const superheat = context.figure('superheat', recent(context, 'superheat'));
		const discharge = context.figure('settledDischargeSuperheat', recent(context, 'settledDischargeSuperheat'));
		if (!superheat || !discharge) return null;
		return {
			strength: ramp(superheat.value, 1.4, 0.2) * ramp(discharge.value, 16, 24),
			sentence: `Settled superheat reads ${context.words.difference(superheat.value)} while the discharge stays ${context.words.difference(discharge.value)} over condensing: dry.`,
			figures: { superheat: superheat.value, dischargeSuperheat: discharge.value },
			starts: superheat.starts.slice(-5),
			show: { signals: ['superheat', 'dischargeSuperheat'], from: 0, to: 3600 }
		};
	}
};

export const suctionTemperatureSensor: SuspectRow = {
	key: 'suction-temperature-sensor',
	family: 'real',
	applies: always,
	clues: [
		suctionOffAtRestToo,
		suctionColdAtRest,
		superheatGoneButDry,
		{
			key: 'superheat-alone-high',
			direction: 'for',
			weight: 0.45,
			discriminates: true,
			needs: ['superheat', 'dischargeSuperheat', 'evapApproach'],
			read: (context) => {
				const superheat = context.figure('superheat', context.held);
				const discharge = context.figure('settledDischargeSuperheat', context.held);
				const approach = context.figure('evapApproach', context.held);
				if (!superheat || !discharge || !approach) return null;
				const high = (context.limit('superheatUsualHigh') ?? (context.nature.evaporator === 'dx' ? 9 : 6)) + 1;
				const wide = context.nature.evaporator === 'dx' ? 6 : 3;
				return {
					strength: Math.min(
						ramp(superheat.value, high, high + 3),
						// Common practice, no source: 15–30 K is ordinary, a starved machine goes well beyond.
						ramp(discharge.value, 34, 26),
						ramp(approach.value, wide, wide * 0.8)
					),
					sentence: `Settled superheat ${context.words.difference(superheat.value)} with ordinary discharge superheat (${context.words.difference(discharge.value)}) and approach (${context.words.difference(approach.value)}).`,
					figures: { superheat: superheat.value, dischargeSuperheat: discharge.value, evapApproach: approach.value },
					starts: superheat.starts.slice(-5),
					show: { signals: ['superheat', 'dischargeSuperheat', 'evapApproach'], from: 0, to: 3600 }
				};
			}
		},
		sensorFound(['suctionTemp'], 'for', 'suction'),
		sensorFound(['suctionTemp'], 'against', 'suction')
	],
	showsWithoutSymptom: true,
	check: {
		key: 'suction-sensor',
		title:
			'Strapped reference probe beside the suction sensor; well, paste and seating; resistance at a known temperature.',
		tools: ['reference thermometer', 'insulation', 'meter'],
		cautions: cautionsFor('hot', 'remoteStart'),
		unitOff: false
	}
};
