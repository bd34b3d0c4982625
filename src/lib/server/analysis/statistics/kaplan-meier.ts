export type SurvivalStep = { time: number; atRisk: number; events: number; survival: number };

/**
 * Kaplan–Meier curve: at each time, S ← S·(1 − events/at risk); a reading censored at a time is still at risk then.
 * One step per distinct time, smallest first.
 * Source: Kaplan & Meier, J. Am. Stat. Assoc. 53 (1958) 457.
 * @throws RangeError when a time is negative or not finite
 */
export function kaplanMeier(items: readonly { time: number; event: boolean }[]): SurvivalStep[] {
	for (const { time } of items)
		if (!(Number.isFinite(time) && time >= 0)) throw new RangeError(`kaplanMeier: ${time} is no time`);
	const times = [...new Set(items.map((item) => item.time))].sort((a, b) => a - b);
	let survival = 1;
	return times.map((time) => {
		const atRisk = items.filter((item) => item.time >= time).length;
		const events = items.filter((item) => item.time === time && item.event).length;
		survival *= 1 - events / atRisk;
		return { time, atRisk, events, survival };
	});
}
