import type { CircuitInput } from '$lib/model/circuit-input';
import type { SignalKey } from '$lib/model/signals';
import type { UnitNature } from '$lib/model/unit';
import { hasReadings } from './series/window';

/**
 * The unit's nature, with what nobody gave filled in where the log's own columns leave no doubt: condenser water means a
 * water-cooled condenser, condenser air without it an air-cooled one, a level a flooded evaporator, a valve position an
 * electronic valve. What a person gave stands. Common practice, no source.
 */
export function shownNature(input: Pick<CircuitInput, 'nature' | 'series'>): UnitNature {
	const { nature, series } = input;
	const any = (...ids: SignalKey[]) => ids.some((id) => hasReadings(series[id]));
	const shown: UnitNature = { ...nature };
	if (!nature.condenser) {
		if (any('condWaterIn', 'condWaterOut', 'condFlow')) shown.condenser = 'water';
		else if (any('condAirIn')) shown.condenser = 'air';
	}
	if (!nature.evaporator && any('evapLevel')) shown.evaporator = 'flooded';
	if (!nature.metering && any('valvePosition')) shown.metering = 'electronic-valve';
	return shown;
}
