import { SIGNALS } from '../model/signals';
import type { UnitSystem } from '../model/quantities';
import type { UnitNature } from '../model/unit';
import type { CheckKind, Readings } from '../model/wire/field';
import { SUSPECT_WORDS } from '../model/words';
import { flowFromDrop } from './flow-curve';
import { formatNumber, formatStored } from './format';

/**
 * What a field check says by itself. The page shows it while the form is filled in, also without a connection, and the
 * server stores the very same judgement.
 */

/** 2 °F and, for a sensor that is hard to reach, 3 °F, in K: common practice, no source. */
export const SENSOR_TOLERANCE = { usual: 2 / 1.8, hard: 3 / 1.8 } as const;
/** About 30 min of running and 5 min off before an oil level is read: common practice, no source. */
export const OIL_LEVEL_SETTLED = { minutesRun: 30, minutesOff: 5 } as const;
/** A flow under this share of design is low: this product's own choice. */
const LOW_FLOW_SHARE = 0.85;
/** A filter drop over this many times the clean one is high: this product's own choice. */
const HIGH_DROP_RATIO = 1.5;
/** A valve that stands further than this from its command does not follow, points: this product's own choice. */
const TRAVEL_OFF = 5;

/** The unit's own figures that the forms know; null where it has none. */
export type CheckLimits = {
	oilLevelLow: number | null;
	oilLevelHigh: number | null;
	pairedSensorTolerance: number | null;
	hardSensorTolerance: number | null;
};
export type CheckUnit = { limits: CheckLimits; nature: UnitNature; air: number };

export type CheckResult = 'within' | 'outside' | 'cannot-tell' | 'told';
export type Judgement = {
	result: CheckResult;
	/** One sentence with its figures. */
	sentence: string;
	/** Why it counts half; empty when every condition was met. */
	reasons: string[];
};

type Of<K extends CheckKind> = { kind: K; readings: Readings<K> };
export type AnyCheck = { [K in CheckKind]: Of<K> }[CheckKind];

/** Readings with what the unit itself knows filled in: the oil band, the tolerance, the flow through its curve. */
export function completeCheck(check: AnyCheck, unit: CheckUnit): AnyCheck {
	switch (check.kind) {
		case 'oil-level': {
			const { oilLevelLow, oilLevelHigh } = unit.limits;
			const { lowMm, highMm } = check.readings;
			return { ...check, readings: { ...check.readings, lowMm: lowMm ?? oilLevelLow, highMm: highMm ?? oilLevelHigh } };
		}
		case 'sensor': {
			const { signal, hardToReach, toleranceK } = check.readings;
			if (SIGNALS[signal].quantity !== 'temperature') return check;
			const usual = hardToReach
				? (unit.limits.hardSensorTolerance ?? SENSOR_TOLERANCE.hard)
				: (unit.limits.pairedSensorTolerance ?? SENSOR_TOLERANCE.usual);
			return { ...check, readings: { ...check.readings, toleranceK: toleranceK ?? usual } };
		}
		case 'water-flow': {
			const { side, drop, flow, design } = check.readings;
			const { nature } = unit;
			const curve = (side === 'evaporator' ? nature.evapFlowCurve : nature.condFlowCurve) ?? [];
			const designed = (side === 'evaporator' ? nature.designEvapFlow : nature.designCondFlow) ?? null;
			const through = drop === null ? null : flowFromDrop(drop, curve);
			return { ...check, readings: { ...check.readings, flow: flow ?? through, design: design ?? designed } };
		}
		default:
			return check;
	}
}

type Say = (value: number, quantity: Parameters<typeof formatStored>[1], options?: { sign?: boolean }) => string;

const speaker =
	(system: UnitSystem, air: number): Say =>
	(value, quantity, options) =>
		formatStored(value, quantity, system, { ...options, air }).replace(' diff.', '');

/** A height as it is measured: inches or millimetres. */
export const formatHeight = (mm: number, system: UnitSystem): string =>
	system === 'ip' ? `${formatNumber(mm / 25.4, 1)}\u00a0in` : `${formatNumber(mm)}\u00a0mm`;

function oilReasons(readings: Readings<'oil-level'>): string[] {
	const { minutesRun, minutesOff, equalised } = readings;
	const { minutesRun: run, minutesOff: off } = OIL_LEVEL_SETTLED;
	const reasons: string[] = [];
	if (minutesRun === null) reasons.push('how long it ran before is not known');
	else if (minutesRun < run) reasons.push(`it ran ${formatNumber(minutesRun)} min before, not about ${run}`);
	if (minutesOff === null) reasons.push('how long it was off is not known');
	else if (minutesOff < off) reasons.push(`it was off ${formatNumber(minutesOff)} min, not ${off}`);
	if (equalised === null) reasons.push('whether the pressures were equalised is not known');
	if (equalised === false) reasons.push('the pressures were not equalised');
	return reasons;
}

function judgeOil(readings: Readings<'oil-level'>, system: UnitSystem): Judgement {
	const { heightMm, lowMm, highMm } = readings;
	const reasons = oilReasons(readings);
	const level = `Oil level ${formatHeight(heightMm, system)} above the separator’s base`;
	if (lowMm === null || highMm === null) {
		const sentence = `${level}; the unit’s own band is not known, so it cannot be judged.`;
		return { result: 'cannot-tell', sentence, reasons };
	}
	const band = `the unit’s band ${formatHeight(lowMm, system)} to ${formatHeight(highMm, system)}`;
	const where = heightMm < lowMm ? 'under' : heightMm > highMm ? 'over' : 'within';
	return { result: where === 'within' ? 'within' : 'outside', sentence: `${level}, ${where} ${band}.`, reasons };
}

function sensorReasons(readings: Readings<'sensor'>): string[] {
	const reasons: string[] = [];
	const { signal, sameSecond, flowProved, accuracyK, toleranceK } = readings;
	if (sameSecond === false) reasons.push('the two were not read at the same second');
	if (SIGNALS[signal].family === 'water' && flowProved === false) reasons.push('water flow was not proved');
	if (accuracyK !== null && toleranceK !== null && accuracyK > toleranceK / 2)
		reasons.push('the instrument is no better than half the tolerance');
	return reasons;
}

function judgeSensor(readings: Readings<'sensor'>, say: Say): Judgement {
	const { signal, displayed, reference, toleranceK } = readings;
	const { label, quantity } = SIGNALS[signal];
	const reasons = sensorReasons(readings);
	const difference = displayed - reference;
	const asDifference =
		quantity === 'temperature' ? 'temperatureDifference' : quantity === 'pressure' ? 'pressureDifference' : quantity;
	const read = `${label[0]?.toUpperCase() ?? ''}${label.slice(1)} shows ${say(displayed, quantity)} against ${say(reference, quantity)} by the reference, ${say(difference, asDifference, { sign: true })}`;
	if (quantity !== 'temperature' || toleranceK === null)
		return { result: 'cannot-tell', sentence: `${read}; no tolerance is set for it.`, reasons };
	const off = Math.abs(difference) > toleranceK + 1e-9;
	const tolerance = `the tolerance of ${say(toleranceK, 'temperatureDifference')}`;
	return {
		result: off ? 'outside' : 'within',
		sentence: `${read}: ${off ? 'out of' : 'within'} ${tolerance}.`,
		reasons
	};
}

function judgeFlow({ side, drop, flow, design }: Readings<'water-flow'>, say: Say): Judgement {
	const what = side === 'evaporator' ? 'Evaporator' : 'Condenser';
	const over = drop === null ? '' : ` (${say(drop, 'pressureDifference')} over the shell)`;
	if (flow === null) {
		const sentence = `${what} pressure drop ${drop === null ? 'not read' : say(drop, 'pressureDifference')}; the unit has no curve that covers it.`;
		return { result: 'cannot-tell', sentence, reasons: [] };
	}
	if (design === null)
		return {
			result: 'cannot-tell',
			sentence: `${what} flow ${say(flow, 'flow')}${over}; the design flow is not known.`,
			reasons: []
		};
	const share = flow / design;
	return {
		result: share < LOW_FLOW_SHARE ? 'outside' : 'within',
		sentence: `${what} flow ${say(flow, 'flow')}${over}, ${formatNumber(100 * share)}\u00a0% of design.`,
		reasons: []
	};
}

function judgeDrop({ drop, clean }: Readings<'oil-filter-drop'>, say: Say): Judgement {
	const read = `Oil filter drop ${say(drop, 'pressureDifference')}`;
	if (clean === null || clean === 0)
		return { result: 'cannot-tell', sentence: `${read}; the clean one is not known.`, reasons: [] };
	const high = drop > HIGH_DROP_RATIO * clean;
	return {
		result: high ? 'outside' : 'within',
		sentence: `${read}, ${formatNumber(drop / clean, 1)} times the clean ${say(clean, 'pressureDifference')}.`,
		reasons: []
	};
}

function judgeTravel({ commanded, actual }: Readings<'valve-travel'>): Judgement {
	const off = Math.abs(commanded - actual);
	return {
		result: off > TRAVEL_OFF ? 'outside' : 'within',
		sentence: `Commanded to ${formatNumber(commanded)}\u00a0%, found at ${formatNumber(actual)}\u00a0%: ${off > TRAVEL_OFF ? 'it does not follow' : 'it follows'}.`,
		reasons: []
	};
}

function judgeSolenoid({ which, works, ohms, ratedOhms, volts, ratedVolts }: Readings<'solenoid'>): Judgement {
	const name =
		which === 'other'
			? 'Solenoid'
			: `${which === 'liquid-line' ? 'Liquid-line' : which === 'load' ? 'Load' : 'Unload'} solenoid`;
	const against = (value: number | null, rated: number | null, unit: string): string[] =>
		value === null
			? []
			: [`${formatNumber(value, 1)}\u00a0${unit}${rated === null ? '' : ` against ${formatNumber(rated, 1)}`}`];
	const electrical = [...against(ohms, ratedOhms, 'Ω'), ...against(volts, ratedVolts, 'V')].join(', ');
	const moved = works ? 'what it commands moves' : 'what it commands does not move';
	return {
		result: works ? 'within' : 'outside',
		sentence: `${name}: ${moved}${electrical === '' ? '' : `; ${electrical}`}.`,
		reasons: []
	};
}

/** Judges a completed check, in one person's units. */
export function judgeCheck(check: AnyCheck, system: UnitSystem, air = 101.325): Judgement {
	const say = speaker(system, air);
	switch (check.kind) {
		case 'oil-level':
			return judgeOil(check.readings, system);
		case 'sensor':
			return judgeSensor(check.readings, say);
		case 'water-flow':
			return judgeFlow(check.readings, say);
		case 'oil-filter-drop':
			return judgeDrop(check.readings, say);
		case 'valve-travel':
			return judgeTravel(check.readings);
		case 'solenoid':
			return judgeSolenoid(check.readings);
		case 'finding': {
			const { suspect, confirms, text } = check.readings;
			const sentence = `${SUSPECT_WORDS[suspect]} ${confirms ? 'confirmed' : 'ruled out'}: ${text}`;
			return { result: 'told', sentence, reasons: [] };
		}
		case 'note':
			return { result: 'told', sentence: check.readings.text, reasons: [] };
	}
}
