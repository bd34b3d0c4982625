/**
 * How strongly a reading speaks, 0…1: nothing at `none`, fully at `full`, straight in between; `full` may lie on
 * either side of `none`. A smooth step keeps a ranking from turning on a tenth of a degree.
 * @throws RangeError when both ends are equal
 */
export function ramp(value: number, none: number, full: number): number {
	if (none === full) throw new RangeError('ramp: both ends are equal');
	return Math.min(1, Math.max(0, (value - none) / (full - none)));
}

/** Strength of lying inside a band, with soft shoulders: rises none→full, stays, falls over→gone. */
export function plateau(value: number, none: number, full: number, over: number, gone: number): number {
	return Math.min(ramp(value, none, full), ramp(value, gone, over));
}
