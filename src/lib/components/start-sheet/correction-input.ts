import type { Outcome, TripKind } from '$lib/model/start';
import type { Start } from '$lib/model/wire/start';

/** Only what a person set otherwise than the log says: the rest goes on following the log. */
export function correctionInput(
	start: Pick<Start, 'outcome' | 'trip' | 'attended'>,
	set: { outcome: Outcome; kind: TripKind; attended: boolean; reason: string }
): { outcome?: Outcome; tripKind?: TripKind; attended?: boolean; reason: string } {
	const { outcome, kind, attended, reason } = set;
	const kindSet = outcome === 'tripped' && kind !== (start.trip?.kind ?? 'unknown');
	return {
		...(outcome === start.outcome ? {} : { outcome }),
		...(kindSet ? { tripKind: kind } : {}),
		...(attended === start.attended ? {} : { attended }),
		reason
	};
}
