import { safetyWords } from '$lib/model/refrigerant-safety';
import type { TripKind } from '$lib/model/start';
import type { Refrigerant } from '$lib/model/unit';
import { CAUTIONS } from '$lib/server/analysis/suspects/cautions';

/** The cautions of a brief: first those of every visit, then what the trips and the refrigerant ask for. */

const COLD: ReadonlySet<TripKind> = new Set([
	'low-evaporator-saturation',
	'low-suction-pressure',
	'low-leaving-water',
	'loss-of-water-flow'
]);
const ELECTRICAL: ReadonlySet<TripKind> = new Set(['motor-temperature', 'starter-fault', 'phase-or-supply']);
const UNTIL_FOUND: ReadonlySet<TripKind> = new Set(['emergency-stop', 'refrigerant-detector']);

export function briefCautions(
	refrigerant: Refrigerant,
	kinds: ReadonlySet<TripKind>
): { text: string; strong: boolean }[] {
	const has = (wanted: ReadonlySet<TripKind>): boolean => [...kinds].some((kind) => wanted.has(kind));
	const plain = (text: string) => ({ text, strong: false });
	return [
		plain(CAUTIONS.qualified),
		{ text: CAUTIONS.protections, strong: true },
		{ text: CAUTIONS.resets, strong: true },
		...(has(COLD) || kinds.size === 0 ? [plain(CAUTIONS.freeze)] : []),
		plain(CAUTIONS.remoteStart),
		plain(CAUTIONS.electrical),
		...(has(ELECTRICAL) ? [{ text: CAUTIONS.electricalStop, strong: true }] : []),
		...(kinds.has('oil-flow') ? [{ text: CAUTIONS.oilStop, strong: true }] : []),
		...(has(UNTIL_FOUND)
			? [
					{
						text: 'No restart after an emergency stop or a refrigerant detector until the reason is found.',
						strong: true
					}
				]
			: []),
		plain(safetyWords(refrigerant)),
		plain(CAUTIONS.trappedLiquid),
		plain(CAUTIONS.hot),
		plain(CAUTIONS.repeat)
	];
}
