import { DEFAULT_LIMITS, LIMIT_KEYS, limitAt } from '$lib/model/unit';
import type { Unit } from '$lib/model/wire/site-unit';
import type { LimitsInForce } from './strip-domain';

/** The unit's limits as they stood at an instant (ms UTC): of each, the value with the latest `validFrom` not after it. */
export function limitsInForce(limits: Unit['limits'], at: number): LimitsInForce {
	const inForce: LimitsInForce = {};
	for (const key of LIMIT_KEYS) {
		// What nobody has changed is this product's own choice.
		const own = limitAt(DEFAULT_LIMITS, key, at);
		if (own) inForce[key] = own;
		let latest = -Infinity;
		for (const { value, provenance, validFrom, note } of limits[key] ?? []) {
			const from = validFrom === null ? -Infinity : Date.parse(validFrom);
			if (from > at || from < latest) continue;
			latest = from;
			inForce[key] = { value, provenance, validFrom: from, ...(note === undefined ? {} : { note }) };
		}
	}
	return inForce;
}
