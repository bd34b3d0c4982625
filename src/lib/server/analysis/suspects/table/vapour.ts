import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { telling } from '../clue-builders';
import { always, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { ramp } from '../strength';

export const suctionRestriction: SuspectRow = {
	key: 'suction-restriction',
	family: 'feed',
	applies: always,
	clues: [
		{
			key: 'suction-under-evaporator',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: ['evapPressure', 'evapSaturation'],
			read: (context) => {
				const early = context.pressureGap(telling(context), 10, 40);
				const late = context.pressureGap(telling(context), 60, 600);
				if (!early || !late) return null;
				// A gap that grows with flow is a pressure drop; a steady one is a sensor.
				return {
					strength: ramp(late.value - early.value, -1.2, -3),
					sentence: `Saturation from pressure falls ${context.words.difference(early.value - late.value)} further under the logged saturation as the machine loads.`,
					figures: { early: early.value, late: late.value },
					starts: late.starts.slice(-5),
					show: { signals: ['evapPressure', 'evapSaturation', 'capacity'], from: 0, to: 600 }
				};
			}
		}
	],
	check: {
		key: 'suction-valves',
		title: 'Service valves fully open, suction screen, pressure at the compressor against the evaporator.',
		tools: ['two gauges', 'valve key'],
		cautions: cautionsFor('refrigerant', 'remoteStart'),
		unitOff: false
	}
};

export const economiserOrInjection: SuspectRow = {
	key: 'economiser-or-injection',
	family: 'feed',
	applies: natureIs('economiser', true),
	clues: [
		{
			key: 'step-when-it-opens',
			direction: 'for',
			weight: 0.5,
			discriminates: true,
			needs: ['economiserValve', 'dischargeSuperheat'],
			read: (context) => {
				const steps = context.bad
					.map((start) => stepAtOpening(context, start.startedAt, start.endedAt ?? Infinity))
					.filter((step) => step !== null);
				const step = median(steps);
				if (step === null) return SILENT;
				return {
					strength: ramp(Math.abs(step), 6, 14) * ramp(steps.length / context.bad.length, 0.3, 0.7),
					sentence: `Discharge superheat steps by ${context.words.difference(step)} when the economiser valve opens, in ${countWords(steps.length, 'tripped start')}.`,
					figures: { step },
					starts: context.bad.slice(-5)
				};
			}
		}
	],
	check: {
		key: 'economiser-valve',
		title: 'Economiser or injection solenoid and valve: opens and closes to its command?',
		tools: ['meter', 'thermometer'],
		cautions: cautionsFor('electrical', 'refrigerant', 'remoteStart'),
		unitOff: false
	}
};

/** Change of discharge superheat from the minute before the economiser valve opens to the minute after. */
function stepAtOpening(context: Context, from: number, to: number): number | null {
	const series = context.reader.series('economiserValve');
	if (!series) return null;
	for (let i = 1; i < series.t.length; i++) {
		const at = series.t[i] ?? 0;
		if (at <= from || at >= to) continue;
		if ((series.v[i - 1] ?? NaN) <= 2 && (series.v[i] ?? NaN) > 5) {
			const before = context.reader.median('dischargeSuperheat', at - 60_000, at - 1);
			const after = context.reader.median('dischargeSuperheat', at + 10_000, Math.min(to, at + 90_000));
			return before === null || after === null ? null : after - before;
		}
	}
	return null;
}
