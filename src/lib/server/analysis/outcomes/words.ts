import type { TripWord } from '$lib/model/circuit-input';
import type { TripKind } from '$lib/model/start';

/** What an alarm text is. `power`: the supply was gone, which is never a trip. */
export type AlarmMeaning =
	{ is: 'trip'; kind: TripKind } | { is: 'power' | 'none' | 'warning' | 'note' | 'clearing' | 'acknowledgement' };

const LOW = /\b(low|lo|under|min|minimum|loss|lost|no|insufficient|short(age)?)\b/;
const HIGH = /\b(high|hi|over|max|maximum|excess(ive)?|overheat(ed|ing)?|hot)\b/;
const EVAP = /\b(evap(orat(or|ing))?|evp|cooler|refrig(erant)?|rfgt|ref)\b/;
const SUCTION = /\b(suct(ion)?|sucn|suc)\b/;
const TEMP = /\b(temp(erature)?s?|tmp|satn?|saturat(ed|ion)|overtemp(erature)?|sst|sct)\b/;
const PRESSURE = /\b(press(ure)?s?|prs|pr|psi|psig|hp|lp)\b/;
const DIFFERENCE = /\b(diff(erential|erence)?|delta|dp|lift|ratio)\b/;
const OIL = /\b(oil|lube|lubrication)\b/;
const COND = /\b(cond(ens(er|ing))?|cnd|head|high side)\b/;
const DISCHARGE = /\b(disch(arge)?|dis|dschg|delivery)\b/;
const WATER = /\b(water|wtr|chw|chws|ecw|lwt|cw|cws|brine|fluid|glycol)\b/;
const FLOW = /\b(flow|flw|flows|pump|flowswitch|paddle)\b/;
const BAD =
	/\b(fail(ed|ure)?|flt|fault(y)?|open|short(ed)?|bad|invalid|range|lost|loss|error|err|disconnected|offline|timeout)\b/;

type Rule = { kind: TripKind; all: readonly RegExp[]; none?: readonly RegExp[] };

/**
 * The trade's words for each trip kind, first fit wins; the direction may be left out but must not be the opposite.
 * Common practice, no source.
 */
const RULES: readonly Rule[] = [
	{ kind: 'emergency-stop', all: [/\b(e ?stop|emergency( stop)?|emerg|mushroom)\b/] },
	{
		kind: 'refrigerant-detector',
		all: [/\b(detect(or|ion)?|refrigerant (leak|monitor)|gas (leak|alarm)|leak (alarm|sensor))\b/]
	},
	{
		kind: 'sensor-or-communication',
		all: [/\b(sensors?|snsr|transducers?|xducer|probe|transmitter|thermistor)\b/, BAD]
	},
	{
		kind: 'sensor-or-communication',
		all: [/\b(comms?|communications?|network|module|io|bus|link|board|controller)\b/, BAD]
	},
	{ kind: 'high-oil-temperature', all: [OIL, TEMP], none: [LOW] },
	{ kind: 'high-oil-temperature', all: [OIL, /\b(hot|overheat(ed|ing)?)\b/] },
	{ kind: 'other', all: [OIL, HIGH, /\blevel\b/] },
	{ kind: 'other', all: [OIL, TEMP, LOW] },
	{ kind: 'oil-flow', all: [OIL] },
	{ kind: 'oil-flow', all: [/\b(lop|lodp|ofs)\b/] },
	{
		kind: 'motor-temperature',
		all: [
			/\b(motor|mtr|winding|stator)\b/,
			/\b(temp(erature)?|overheat(ed|ing)?|hot|thermistor|ptc|klixon|overtemp(erature)?|thermal)\b/
		]
	},
	{ kind: 'motor-temperature', all: [/\b(windings?|klixon|ptc)\b/] },
	{ kind: 'other', all: [/\blow\b/, /\bsuperheat\b/] },
	{ kind: 'high-discharge-temperature', all: [DISCHARGE, TEMP], none: [LOW, PRESSURE] },
	{ kind: 'high-discharge-temperature', all: [/\b(hdt|dgt|hot gas temp)\b/] },
	{ kind: 'starter-fault', all: [/\b(ground|earth) (fault|leakage|flt)\b/] },
	{
		kind: 'phase-or-supply',
		all: [
			/\b(phases?|volt(age|s)?|under ?voltage|over ?voltage|uv|brown ?out|supply fault|unbalance|imbalance|power quality|frequency)\b/
		]
	},
	{ kind: 'loss-of-water-flow', all: [FLOW] },
	{ kind: 'loss-of-water-flow', all: [WATER, DIFFERENCE] },
	{ kind: 'low-leaving-water', all: [/\b(freeze|freezing|freezestat|frost|antifreeze)\b/] },
	{
		kind: 'low-leaving-water',
		all: [/\b(lvg|leaving|lwt|llwt|chw|chws|chilled|supply)\b/, /\b(temp(erature)?|water|lwt|llwt|wtr)\b/],
		none: [HIGH, COND]
	},
	{ kind: 'low-leaving-water', all: [EVAP, WATER, TEMP], none: [HIGH] },
	{ kind: 'other', all: [WATER, HIGH] },
	{ kind: 'low-pressure-difference', all: [DIFFERENCE], none: [HIGH, OIL] },
	{ kind: 'low-pressure-difference', all: [/\bsystem\b/, PRESSURE, LOW] },
	{ kind: 'high-condensing', all: [COND], none: [LOW, WATER] },
	{ kind: 'high-condensing', all: [DISCHARGE, PRESSURE], none: [LOW] },
	{
		kind: 'high-condensing',
		all: [/\b(high pressure|hi pressure|high press|hi press|hp|hpc|hpco|hpt)\b/],
		none: [SUCTION, EVAP]
	},
	{ kind: 'low-suction-pressure', all: [SUCTION, PRESSURE], none: [HIGH] },
	{ kind: 'low-suction-pressure', all: [EVAP, PRESSURE], none: [HIGH, TEMP] },
	{ kind: 'low-suction-pressure', all: [/\b(low pressure|lo pressure|low press|lo press|lp|lpc|lpco|lpt|low side)\b/] },
	{ kind: 'low-evaporator-saturation', all: [/\b(lept?|lest|lsst|lrtc|lets?|lst|ltc)\b/] },
	{ kind: 'low-evaporator-saturation', all: [EVAP], none: [HIGH, WATER] },
	{ kind: 'low-evaporator-saturation', all: [SUCTION], none: [HIGH] },
	{ kind: 'low-evaporator-saturation', all: [/\b(low|lo)\b/, /\b(sat|saturat(ed|ion)|sst)\b/] },
	{
		kind: 'starter-fault',
		all: [
			/\b(starter|contactor|transition|overload|over ?current|olr?|locked rotor|vfd|drive|inverter|soft ?start(er)?|welded|jam|current|amps)\b/
		]
	},
	{
		kind: 'external-interlock',
		all: [/\b(interlock|external|ext|remote|customer|auxiliary|aux|fire|plant safety|bms)\b/]
	},
	{
		kind: 'other',
		all: [
			/\b(surge|purge|vanes?|slide|level|valve|vibration|superheat|bearing|limit|wet|liquid|gas|slugging|flooding|discharge)\b/
		]
	}
];

const NOTHING =
	/^(no(ne)?|nil|normal|ok|okay|healthy|clear|cleared|inactive|false|off|n a|na|0+|no (active )?(alarms?|faults?|trips?|errors?)|alarms? (off|ok|none|clear|normal)|all (ok|clear|normal)|)$/;
const POWER =
	/\b(power (fail(ure|ed)?|loss|lost|outage|cycle|cycled|up|restored|off)|loss of power|blackout|mains (fail(ure)?|loss)|restart after power)\b/;
const PROTECTIVE =
	/\b(trip(ped|s)?|alarm|fault|flt|fail(ed|ure)?|shutdown|shut down|cut ?out|lock ?out|safety|protection|protect)\b/;
const WARNING =
	/\b(warn(ing)?s?|pre ?alarm|advisory|caution|notice|limiting|limited|limit active|inhibit(ed)?|reminder|maintenance|service due|approaching|unloading|override|hold(ing)?|pending)\b/;
const ACKNOWLEDGED = /\b(ack|acked|acknowledged?|acknowledgement)\b/;
const CLEARED =
	/\b(cleared|clear|returned? to normal|return to normal|rtn|restored|resolved|reset (by|ok|done|complete)|alarm reset|fault reset|reset$)/;
const RESET_KIND = /\b(manual|man|auto|automatic|hand|requires?|required|needs?)\b.*\breset\b|\breset required\b/;
const STATUS =
	/\b(run(ning)?|start(ed|ing|up)?|stop(ped|ping)?|schedule|standby|enabled?|disabled?|auto|ready|recycl(e|ing)|operator|setpoint|mode|log(ged)? ?(in|on|out)|user|demand|load(ed|ing)?|normal|command(ed)?|cooling|idle|wait(ing)?|delay(ed)?|timer|online|(un)?occupied|local|satisfied)\b/;

/** Does a text speak of a protection: trip, alarm, fault, failure, shutdown, cut-out, lock-out? */
export function speaksOfProtection(text: string): boolean {
	return PROTECTIVE.test(plainWords(text));
}

/** Text in lower case, camel case and joining marks opened to spaces. */
export function plainWords(text: string): string {
	return text
		.replace(/([a-z])([A-Z])/g, '$1 $2')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, ' ')
		.trim();
}

/**
 * What an alarm text says, through the unit's own words first, then the trade's. A code without words is a trip of
 * kind `unknown` unless the unit's words map it.
 */
export function readAlarm(text: string, own: readonly TripWord[] = [], code?: string): AlarmMeaning {
	const plain = plainWords(text);
	for (const word of own) {
		const wanted = plainWords(word.words);
		const inText = wanted !== '' && ` ${plain} `.includes(` ${wanted} `);
		if (inText || (code !== undefined && wanted === plainWords(code))) return { is: 'trip', kind: word.kind };
	}
	if (NOTHING.test(plain)) return { is: 'none' };
	if (ACKNOWLEDGED.test(plain)) return { is: 'acknowledgement' };
	if (CLEARED.test(plain) && !RESET_KIND.test(plain)) return { is: 'clearing' };
	if (POWER.test(plain)) return { is: 'power' };
	if (WARNING.test(plain) && !/\b(trip(ped)?|shutdown|cut ?out|lock ?out)\b/.test(plain)) return { is: 'warning' };
	const rule = RULES.find((r) => r.all.every((x) => x.test(plain)) && !(r.none ?? []).some((x) => x.test(plain)));
	const protective = PROTECTIVE.test(plain);
	// "Remote stop", "external start": words of a state, not of a protection.
	const onlyStatus = STATUS.test(plain) && !protective && (rule === undefined || rule.kind === 'external-interlock');
	if (onlyStatus) return { is: 'note' };
	return { is: 'trip', kind: rule?.kind ?? 'unknown' };
}
