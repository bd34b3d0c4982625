/** Minutes since midnight at a site's clock, and the day it belongs to. */
export type ClockOf = (at: number) => { day: string; minute: number };

/**
 * A clock of an IANA zone; one formatter serves all calls.
 * @throws RangeError when the zone is not known
 */
export function siteClock(timeZone: string): ClockOf {
	const format = new Intl.DateTimeFormat('en-CA', {
		timeZone,
		hourCycle: 'h23',
		year: 'numeric',
		month: '2-digit',
		day: '2-digit',
		hour: '2-digit',
		minute: '2-digit'
	});
	return (at) => {
		const parts: Record<string, string> = {};
		for (const part of format.formatToParts(at)) parts[part.type] = part.value;
		const minute = Number(parts.hour) * 60 + Number(parts.minute);
		return { day: `${parts.year}-${parts.month}-${parts.day}`, minute };
	};
}

/**
 * Stops that fall on a schedule: within 2 min of the same clock time on three days or more, and on at least 40 % of the
 * days with a stop [ours]. Only stops of runs that outlived the start-up window (`long`) make a schedule, since a start
 * that trips after a scheduled start would look regular too. Times in ms; returns one mark a stop.
 */
export function onSchedule(stops: readonly { at: number; long: boolean }[], clock: ClockOf): boolean[] {
	const read = stops.map((stop) => ({ ...clock(stop.at), long: stop.long }));
	const days = new Set(read.map((r) => r.day)).size;
	const perMinute = new Map<number, Set<string>>();
	for (const { day, minute, long } of read) {
		if (!long) continue;
		for (let m = minute - 2; m <= minute + 2; m++) {
			const key = (m + 1440) % 1440;
			perMinute.set(key, (perMinute.get(key) ?? new Set()).add(day));
		}
	}
	return read.map(({ day, minute }) => {
		const others = new Set(perMinute.get(minute));
		others.add(day);
		return others.size >= 3 && others.size >= 0.4 * days && (perMinute.get(minute)?.size ?? 0) >= 3;
	});
}
