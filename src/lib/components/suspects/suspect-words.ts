import { SUSPECT_KEYS, type SuspectKey } from '$lib/model/suspect';
import type { Suspect, Suspects } from '$lib/model/wire/start';
import { STANDING_WORDS, SUSPECT_WORDS } from '$lib/model/words';

const isSuspect = (key: string): key is SuspectKey => (SUSPECT_KEYS as readonly string[]).includes(key);

/** A suspect's name. */
export function suspectName(key: string): string {
	return isSuspect(key) ? SUSPECT_WORDS[key] : key;
}

const lowerFirst = (text: string) => text.charAt(0).toLowerCase() + text.slice(1);

/** The sheet's heading: what the log says, or that it cannot tell. */
export function suspectsTitle({ verdict, suspects, missingSignals }: Suspects, missing: readonly string[]): string {
	const lead = suspects[0];
	if (verdict === 'no-fault-pattern') return 'Nothing in this log points to a fault';
	if (verdict === 'cannot-tell' || !lead) {
		if (missingSignals.length === 0) return 'This log cannot tell';
		const few = missing.slice(0, 3).join(', ');
		return `This log cannot tell: ${few}${missing.length > 3 ? ` and ${missing.length - 3} more` : ''} would`;
	}
	const words = lead.standing === 'points-to' ? 'The log points to' : 'The log fits';
	return `${words} ${lowerFirst(suspectName(lead.key))}`;
}

/** Does the log say anything for this suspect? */
export const isNamed = ({ standing }: Suspect): boolean => standing === 'points-to' || standing === 'fits';

/** The order of thought: first whether the low saturation is real, then water, oil, load, feed. */
const THOUGHT: readonly { name: string; keys: readonly SuspectKey[] }[] = [
	{ name: 'Is the reading real?', keys: ['evap-saturation-sensor', 'suction-temperature-sensor', 'limits-or-setup'] },
	{
		name: 'Water',
		keys: [
			'low-water-flow',
			'flow-proving',
			'water-short-circuit',
			'cold-condenser-water',
			'fouled-condenser',
			'fouled-evaporator',
			'non-condensables'
		]
	},
	{
		name: 'Oil',
		keys: [
			'low-oil',
			'oil-restriction',
			'oil-in-evaporator',
			'oil-heater',
			'refrigerant-migration',
			'low-pressure-difference'
		]
	},
	{ name: 'Load', keys: ['slide-not-unloading', 'slide-not-loading', 'plant-staging', 'starter-or-supply'] },
	{
		name: 'Feed',
		keys: [
			'valve-underfeeding',
			'valve-overfeeding',
			'low-refrigerant-charge',
			'liquid-line-restriction',
			'suction-restriction',
			'economiser-or-injection',
			'valve-leaking-back'
		]
	}
];

export type ThoughtStep = { name: string; standing: Suspect['standing']; words: string; leading: string | null };

/** Each step of the order of thought with its strongest suspect; a step the log cannot show says so. */
export function thoughtSteps(suspects: readonly Suspect[]): ThoughtStep[] {
	return THOUGHT.map(({ name, keys }) => {
		const own = suspects.filter(({ key }) => (keys as readonly string[]).includes(key));
		const named = own.find(isNamed);
		if (named) {
			const leading = suspectName(named.key);
			return { name, standing: named.standing, words: STANDING_WORDS[named.standing], leading };
		}
		const against = own.some(({ standing }) => standing === 'speaks-against');
		const seen = own.some(({ clues }) => clues.some(({ direction }) => direction !== 'missing'));
		if (against || seen) return { name, standing: 'speaks-against', words: 'nothing here', leading: null };
		return { name, standing: 'cannot-tell', words: 'the log cannot show it', leading: null };
	});
}
