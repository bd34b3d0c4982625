/** Words that stand in cells: on and off, running and not, and "there is no reading here". */

const ON = new Set(
	(
		'on|true|yes|y|t|run|running|start|started|active|activated|enable|enabled|open|opened|proven|proved|made|flow|' +
		'flow proven|energized|energised|high|occupied|occ|called|calling|in|1|ein|an|ja|marche|oui|si|sí|encendido|wahr|vrai'
	).split('|')
);
const OFF = new Set(
	(
		'off|false|no|n|f|stop|stopped|inactive|deactivated|disable|disabled|close|closed|shut|not proven|unproven|no flow|' +
		'de-energized|de-energised|deenergized|low|unoccupied|unocc|idle|out|not running|not active|0|aus|nein|arrêt|arret|' +
		'non|apagado|falsch|faux'
	).split('|')
);
/** States of a machine that a status column prints, and whether the compressor turns in them. */
const TURNING = new Set(
	(
		'loading|unloading|loaded|unloaded|holding|hold|full load|part load|running loaded|running unloaded|running - loaded|' +
		'at capacity|limiting|running - limit|limited|pull down|pulldown|cooling|pump down|pumping down|normal run|soft loading|ramp|ramping|running normal|running limited'
	).split('|')
);
const STANDING = new Set(
	(
		'ready|standby|stand by|stand-by|shutdown|shut down|shutting down|trip|tripped|fault|faulted|alarm|lockout|locked out|' +
		'locked-out|waiting|wait|starting|prestart|pre-start|prelube|pre-lube|pre lube|post lube|restart inhibit|restart timer|' +
		'anti recycle|anti-recycle|recycle|ready to start|auto off|manual off|remote off|local off|off - ready|safety|safety stop|stopping|power up|initializing|initialising|none|unit off|schedule off|time delay|off cycle|cycling off'
	).split('|')
);
const NOTHING = new Set(
	(
		'nan|null|nil|none|n/a|na|n.a.|#n/a|#na|n/v|#value!|#ref!|#div/0!|#num!|#name?|#null!|missing|no data|nodata|no reading|' +
		'not available|unavailable|unknown|error|err|bad|invalid|fault|faulted|fail|failed|offline|off-line|off line|disconnected|' +
		'comm fail|comm failure|comms fail|communication failure|timeout|timed out|no comm|no comms|lost|down|stale|disabled|' +
		'out of range|overrange|over range|underrange|under range|open circuit|short circuit|sensor fail|sensor failure|' +
		'not connected|undefined|inf|-inf|infinity|-infinity|bad input|i/o timeout|no value|empty|void|-nan|1.#qnan|-1.#ind|nc'
	).split('|')
);
/** Numbers that loggers write for "no reading". They count as that only where the signal could not hold them. */
const SENTINELS = new Set([
	-1, -99, -99.9, -999, -999.9, -9999, -99999, -999999, 999, 999.9, 9999, 9999.9, 99999, 999999, 32767, 3276.7, 327.67,
	-32768, -3276.8, -327.68, 65535, 6553.5, 655.35, 2147483647, -2147483648, 4294967295
]);

/** 1 for a word of on, 0 for one of off, NaN for any other (in any case, blanks around it passed over). */
export function stateOf(word: string): number {
	const w = word.trim().toLowerCase();
	if (ON.has(w)) return 1;
	if (OFF.has(w)) return 0;
	return NaN;
}

/** {@link stateOf}, with the words a status column has for a machine that turns or stands. */
export function runStateOf(word: string): number {
	const w = word.trim().toLowerCase();
	const plain = stateOf(w);
	if (!Number.isNaN(plain)) return plain;
	if (TURNING.has(w) || /^run(ning)?\b/.test(w)) return 1;
	if (STANDING.has(w) || /^(off|stopped|tripped|fault)\b/.test(w)) return 0;
	return NaN;
}

/** Does the word say that there is no reading? */
export function isNothing(word: string): boolean {
	return NOTHING.has(word.trim().toLowerCase());
}

/** Is the number one that loggers write for "no reading"? */
export function isSentinel(value: number): boolean {
	return SENTINELS.has(value) || Math.abs(value) > 1e30;
}
