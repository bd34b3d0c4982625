import type { FieldCheckFact } from '$lib/model/checks';
import type { StartRecord } from '$lib/model/start';
import { median } from '../../statistics/median';
import { countWords } from '../../wording/quantity-words';
import { cautionsFor } from '../cautions';
import { checkClue, figureClue, recent, telling } from '../clue-builders';
import { type ClueRule, natureIs, SILENT, type SuspectRow } from '../clue-rule';
import type { Context } from '../context';
import { plateau, ramp } from '../strength';
import { restsLoadIt } from './oil';
import { capacityRuns, latestCheck, stallShare } from './shared';

const slide = natureIs('capacityControl', 'slide');

/** Capacity in the last samples of the normal stop before each of the starts asked for. */
function capacityAtLastStop(context: Context): { value: number; starts: StartRecord[] } | null {
	const found: { start: StartRecord; value: number }[] = [];
	for (const start of telling(context)) {
		const index = context.starts.indexOf(start);
		const before = context.starts.slice(0, Math.max(0, index)).reverse();
		const stop = before.find((one) => one.outcome === 'held' || one.outcome === 'called-off')?.endedAt;
		// The nearest normal stop must be the last stop: a trip in between leaves the slide where it was.
		if (!stop || before[0]?.endedAt !== stop) continue;
		const value = context.reader.last('capacity', stop - 1, 90_000);
		if (value !== null) found.push({ start, value });
	}
	const value = median(found.map((one) => one.value));
	return value === null ? null : { value, starts: found.map((one) => one.start) };
}

const lastStopLoaded = (direction: 'for' | 'against', weight: number): ClueRule => ({
	key: direction === 'for' ? 'last-stop-loaded' : 'last-stop-unloaded',
	direction,
	weight,
	needs: ['capacity'],
	read: (context) => {
		const stop = capacityAtLastStop(context);
		if (!stop) return null;
		return {
			strength: direction === 'for' ? ramp(stop.value, 50, 65) : ramp(stop.value, 40, 25),
			sentence: `The last normal stop before ended at ${context.words.percent(stop.value)} capacity, median of ${countWords(stop.starts.length, 'start')}.`,
			figures: { capacity: stop.value },
			starts: stop.starts,
			show: { signals: ['capacity'], from: -120, to: 120 }
		};
	}
});

const solenoid = (which: 'load' | 'unload') => (check: FieldCheckFact) =>
	check.kind === 'solenoid' && check.which === which ? check : null;

export const slideNotUnloading: SuspectRow = {
	key: 'slide-not-unloading',
	family: 'load',
	applies: slide,
	clues: [
		figureClue({
			key: 'loaded-from-first-seconds',
			readAt: 'start',
			weight: 0.7,
			discriminates: true,
			what: 'Capacity from the first seconds',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			// 70 % and more from the first seconds: common practice, no source.
			strength: (value) => ramp(value, 62, 71),
			show: { signals: ['capacity', 'evapSaturation'], from: 0, to: 180 }
		}),
		{
			key: 'amps-from-first-seconds',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['motorCurrent'],
			read: (context) => {
				if (context.reader.has('capacity') || context.held.length < 2) return SILENT;
				const bad = context.figure('startAmps', context.bad);
				const held = context.figure('startAmps', context.held);
				if (!bad || !held) return null;
				return {
					strength: ramp(bad.value / held.value, 1.15, 1.4),
					sentence: `Motor current after the starter's transition ${context.words.of(bad.value, 'current')}; held starts ${context.words.of(held.value, 'current')}.`,
					figures: { amps: bad.value, held: held.value },
					starts: bad.starts,
					show: { signals: ['motorCurrent'], from: 0, to: 180 }
				};
			}
		},
		lastStopLoaded('for', 0.3),
		{
			key: 'loaded-at-rest',
			direction: 'for',
			weight: 0.2,
			needs: ['capacity'],
			read: (context) => {
				const values = telling(context)
					.map((start) => context.reader.last('capacity', start.startedAt - 1, 120_000))
					.filter((value) => value !== null);
				const value = median(values);
				if (value === null) return null;
				return {
					strength: ramp(value, 45, 60),
					sentence: `The slide stood at ${context.words.percent(value)} before the start.`,
					figures: { capacity: value },
					starts: telling(context)
				};
			}
		},
		figureClue({
			key: 'starts-unloaded',
			readAt: 'start',
			direction: 'against',
			weight: 0.8,
			what: 'Capacity at start is low:',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			strength: (value) => ramp(value, 62, 54)
		}),
		{
			key: 'stalls-with-oil',
			direction: 'against',
			weight: 0.35,
			needs: ['capacity'],
			read: (context) => {
				const stall = stallShare(context);
				return stall ? { ...stall.reading, strength: stall.sureness * ramp(stall.share, 0.2, 0.5) } : SILENT;
			}
		},
		checkClue('unload-solenoid-dead', 'for', (context) => {
			const check = latestCheck(context, solenoid('unload'));
			if (!check || check.works) return null;
			return {
				at: check.at,
				half: check.indicative,
				strength: 1,
				sentence: 'The unload solenoid was found not working.'
			};
		}),
		checkClue('unload-solenoid-works', 'against', (context) => {
			const check = latestCheck(context, solenoid('unload'));
			if (!check?.works) return null;
			return { at: check.at, half: true, strength: 1, sentence: 'The unload solenoid was found working.' };
		})
	],
	explainedBy: [{ key: 'low-oil', share: 0.3 }],
	check: {
		key: 'slide-travel',
		title:
			'Does the slide reach minimum at shutdown? Then the unload solenoid: coil, voltage under command, polarity, screens; slide feedback zero.',
		tools: ['meter', 'coil tester', 'the unit’s wiring diagram'],
		cautions: cautionsFor('remoteStart', 'electrical', 'hot', 'resets'),
		unitOff: true
	}
};

export const slideNotLoading: SuspectRow = {
	key: 'slide-not-loading',
	family: 'load',
	applies: slide,
	clues: [
		{
			key: 'stall',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['capacity'],
			read: (context) => {
				const stall = stallShare(context);
				return stall ? { ...stall.reading, strength: stall.sureness * ramp(stall.share, 0.1, 0.4) } : SILENT;
			}
		},
		{
			key: 'stall-far-from-full',
			direction: 'for',
			weight: 0.4,
			discriminates: true,
			needs: ['capacity'],
			read: (context) => {
				const stall = stallShare(context);
				if (!stall) return SILENT;
				return {
					...stall.reading,
					sentence: `The stall stands at ${context.words.percent(stall.level)}, well short of full.`,
					strength: stall.sureness * ramp(stall.level, 83, 77)
				};
			}
		},
		{
			key: 'stalls-from-ordinary-start',
			direction: 'for',
			weight: 0.25,
			needs: ['capacity'],
			read: (context) => {
				const stall = stallShare(context);
				const start = context.figure('startCapacity', context.starts);
				if (!stall || !start) return SILENT;
				return {
					strength:
						stall.sureness *
						ramp(stall.share, 0.1, 0.4) *
						ramp(start.value, 56, 51) *
						ramp(restsLoadIt(context)?.more ?? 0, 6, 2.5) *
						ramp(stall.level, 90, 84) *
						ramp(context.figure('settledMargin', recent(context, 'settledMargin'))?.value ?? 0, 13, 10),
					sentence: `It stalls although capacity at start is ordinary: ${context.words.percent(start.value)}.`,
					figures: { startCapacity: start.value },
					starts: start.starts.slice(-5)
				};
			}
		},
		figureClue({
			key: 'over-staged-too',
			direction: 'against',
			weight: 0.4,
			what: 'Capacity at start is raised as well:',
			quantity: 'percent',
			figure: 'startCapacity',
			needs: ['capacity'],
			of: telling,
			strength: (value) => ramp(value, 53, 57)
		}),
		{
			key: 'limited-instead',
			direction: 'against',
			weight: 0.6,
			needs: ['capacity'],
			read: (context) => {
				const limited = context.starts.filter((start) => start.stall?.verdict === 'limited');
				const by = limited.at(-1)?.stall?.limiting;
				if (limited.length === 0 || !by) return SILENT;
				return {
					strength: ramp(limited.length / (limited.length + context.stalls.length), 0.4, 0.9),
					sentence: `Loading was held by a limit in ${countWords(limited.length, 'run')}: ${by}.`,
					figures: { limited: limited.length },
					starts: limited.slice(-5)
				};
			}
		},
		{
			key: 'loads-when-asked',
			direction: 'against',
			weight: 0.6,
			needs: ['capacity'],
			read: (context) => {
				const runs = capacityRuns(context);
				const loaded = runs.filter((start) => (start.figures.peakCapacity ?? 0) >= 96);
				if (runs.length < 2 || context.stalls.length > 0) return SILENT;
				return {
					strength: plateau(loaded.length / runs.length, 0.2, 0.6, 2, 3),
					sentence: `It loads when asked: ${loaded.length} of ${countWords(runs.length, 'long run')} passed 96 %, and none stalled.`,
					figures: { loaded: loaded.length, runs: runs.length },
					starts: loaded.slice(-5)
				};
			}
		},
		checkClue('load-solenoid-dead', 'for', (context) => {
			const check = latestCheck(context, solenoid('load'));
			if (!check || check.works) return null;
			return {
				at: check.at,
				half: check.indicative,
				strength: 1,
				sentence: 'The load solenoid was found not working.'
			};
		})
	],
	explainedBy: [{ key: 'low-oil', share: 0.4 }],
	showsWithoutSymptom: true,
	check: {
		key: 'load-solenoid',
		title:
			'Load solenoid under command, leakage past the slide’s piston, slide feedback, and which limits are in force.',
		tools: ['meter', 'coil tester', 'the unit’s wiring diagram'],
		cautions: cautionsFor('remoteStart', 'electrical', 'hot'),
		unitOff: true
	}
};
