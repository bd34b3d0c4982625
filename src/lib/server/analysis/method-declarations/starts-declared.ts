import type { MethodSection } from './types';

/** Starts, outcomes and trips. */
export const STARTS_SECTION: MethodSection = {
	key: 'starts',
	title: 'Starts, outcomes and trips',
	lead: 'A start is the compressor’s going from off to on and the run that follows. Its instants carry the uncertainty of the sampling.',
	entries: [
		{
			name: 'A run',
			says: 'Status says on; current vetoes only over two samples below a tenth of the rated. Off for less than 20 s is no stop unless a trip is recorded in it. The first running row of a log is no start.',
			origin: 'ours'
		},
		{
			name: 'First start',
			says: 'A start after a long rest, six hours unless the unit says otherwise. A rest over seven days is a lay-up and stands apart; a rest that touches a gap is “at least”.',
			origin: 'ours'
		},
		{
			name: 'Start-up window',
			says: 'Twenty minutes unless the unit says otherwise. A run that outlives it and does not end in a trip has held.',
			origin: 'ours'
		},
		{
			name: 'Outcomes',
			says: 'Tripped: a protective stop. Held: outlived the window. Called off: a normal stop inside it. Lost: the log ends, has a gap, or power failed. Unclear: it stopped and the log cannot say why.',
			origin: 'ours'
		},
		{
			name: 'Recorded trip',
			says: 'A protective alarm’s activation, matched to the nearest stop, from 30 s before it to two minutes after (or twice the alarm log’s period). Acknowledgements, clearings and warnings are none. One activation, one stop.',
			origin: 'ours'
		},
		{
			name: 'Inferred trip',
			says: 'Only where the machine stopped loaded, without unloading or a valve closing before it, not near a command or a schedule, with water above setpoint, sampled every minute or finer, and a protective quantity past its limit or running to it. A flow proof that opens in the row of the stop and closes again by itself counts as past; water that is only on its way to its limit does not, since it has met its setpoint before.',
			origin: 'ours'
		},
		{
			name: 'Power failure',
			says: 'Everything stops at once, other units too, often with a gap. Never counted as a trip. Rows more than two minutes apart cannot show it.',
			origin: 'ours'
		},
		{
			name: 'Episode',
			says: 'A first try and the tries after it, until one outlives the window or the rest is long again. Rates count episodes, since the tries of one are not independent.',
			origin: 'ours'
		},
		{
			name: 'Attended',
			says: 'A start during a visit, in manual or in test: shown, and kept out of rates, proof and the usual clock.',
			origin: 'ours'
		},
		{
			name: 'Stall',
			says: 'Capacity flat for five minutes, five points or more below what is demanded (or water well above setpoint), not at its maximum, and no limit in force. Where a limit’s quantity is not logged, it cannot be told.',
			origin: 'ours'
		},
		{
			name: 'A limit that is not logged',
			says: 'Three flat stretches or more at one motor current (2 %), condensing (0.5 K) or evaporator saturation (0.4 K) but at capacities eight points apart were held by it, when the runs never go past that value; the saturation only while the water stands 0.8 K or more over its setpoint. A limit that was merely near is taken back where three other runs stall at the same capacity, within 1.5 points.',
			origin: 'ours'
		},
		{
			name: 'Nature that nobody gave',
			says: 'Condenser water in the log means a water-cooled condenser, condenser air without it an air-cooled one, a level a flooded evaporator, a valve position an electronic valve; runs that settle at 3.5 K of superheat or more mean direct expansion. What is still not known halves a clue once.',
			origin: 'practice'
		},
		{
			name: 'Headroom',
			says: 'The least distance to each protection from the end of the bypass to ten minutes, made smaller by what one spacing can hide. The limit is the configured one, or the bracket learned between the highest value at a trip and the lowest survived.',
			formula: 'min over t of (value − limit), for a high limit (limit − value), less slope × spacing',
			origin: 'ours'
		},
		{
			name: 'First mover',
			says: 'Which signal left the band of at least five matched held starts first, for two samples or more, with the error of sampling and of the sensor’s lag (pressure and current 0 s, water 40 ± 20 s). Overlapping errors: the order cannot be told.',
			formula: 'band = median ± 3 × median absolute deviation',
			origin: 'ours'
		}
	]
};
