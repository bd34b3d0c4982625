import type { StartRecord } from '$lib/model/start';
import { median } from '../statistics/median';
import { probabilityOfSuperiority } from '../statistics/probability-of-superiority';
import type { Words } from '../wording/quantity-words';
import { siteClock } from '../wording/site-clock';
import type { FirstTry } from './first-tries';
import { type Share, shareOf } from './proportions';

/** Before 11:00 is morning, from 12:00 afternoon, by the site's clock [ours]. */
export const MORNING_BEFORE = 11 * 60;
export const AFTERNOON_FROM = 12 * 60;

export type CrossTable = {
	rows: string;
	columns: string[];
	cells: { label: string; shares: (Share | null)[] }[];
	/** Whether clock, rest and condenser water can be told apart. */
	note: string | null;
};

const isMorning = (start: StartRecord, zone: string) => siteClock(start.startedAt, zone).minutes < MORNING_BEFORE;
const isAfternoon = (start: StartRecord, zone: string) => siteClock(start.startedAt, zone).minutes >= AFTERNOON_FROM;
const water = (start: StartRecord) => start.figures.condWaterInAtStart ?? start.figures.outdoorAtStart;

/** Share of morning starts after a long rest against that of afternoon starts; near 1 and 0 they are one thing. */
function restNote(morning: readonly FirstTry[], afternoon: readonly FirstTry[]): string | null {
	const share = (list: readonly FirstTry[]) => list.filter((one) => one.start.firstStart).length / list.length;
	if (morning.length < 3 || afternoon.length < 3) return null;
	if (share(morning) >= 0.9 && share(afternoon) <= 0.1)
		return 'Clock and rest cannot be told apart here: mornings follow long rests and afternoons short ones.';
	return null;
}

function waterNote(morning: readonly FirstTry[], afternoon: readonly FirstTry[], words: Words): string | null {
	const values = (list: readonly FirstTry[]) => list.map((one) => water(one.start)).filter((value) => value !== null);
	const [cold, warm] = [values(morning), values(afternoon)];
	const above = probabilityOfSuperiority(cold, warm);
	if (cold.length < 3 || warm.length < 3 || above === null || (above > 0.15 && above < 0.85)) return null;
	return `Mornings also had other condenser water (${words.temperature(median(cold))} against ${words.temperature(median(warm))}): match on it before blaming the hour.`;
}

/** Counted first tries by clock and rest, and what can be said about telling them apart. Null without a first try. */
export function crossTableOf(counted: readonly FirstTry[], timeZone: string, words: Words): CrossTable | null {
	if (counted.length === 0) return null;
	const morning = counted.filter((one) => isMorning(one.start, timeZone));
	const afternoon = counted.filter((one) => isAfternoon(one.start, timeZone));
	const between = counted.filter((one) => !morning.includes(one) && !afternoon.includes(one));
	const row = (label: string, list: readonly FirstTry[]) => ({
		label,
		shares: [true, false].map((first) => {
			const cell = list.filter((one) => one.start.firstStart === first);
			return cell.length === 0 ? null : shareOf(cell, timeZone);
		})
	});
	const notes = [restNote(morning, afternoon), waterNote(morning, afternoon, words)].filter((note) => note !== null);
	return {
		rows: 'clock of the site',
		columns: ['after a long rest', 'after a short rest'],
		cells: [
			row('before 11:00', morning),
			...(between.length > 0 ? [row('11:00 to 12:00', between)] : []),
			row('from 12:00', afternoon)
		],
		note: notes.length > 0 ? notes.join(' ') : null
	};
}
