import { MEASURES, type MeasureKey, type Quantity } from '$lib/model/quantities';

/** What a unit word of a header or cell may mean, likeliest first. One meaning: it is certain. */
export type UnitMeaning = readonly MeasureKey[];

const WORDS: Readonly<Record<string, UnitMeaning>> = {};
function say(words: string, ...meaning: MeasureKey[]): void {
	for (const word of words.split(' ')) (WORDS as Record<string, UnitMeaning>)[word] = meaning;
}
say('degf f fahrenheit degreesf degreesfahrenheit degreefahrenheit degfahrenheit °fahrenheit', 'degF');
say('degc c celsius centigrade degreesc degreescelsius degreecelsius degcelsius', 'degC');
say('k kelvin deltak deltadegc δk δdegc degcdiff deltac kdiff delta_k dk', 'K');
say('degfdiff deltadegf δdegf δf deltaf fdiff delta_f degfdelta df', 'degFdiff');
say('psi lb/in2 lbf/in2 #', 'psig', 'psia', 'psid');
say('psig psi(g) psigauge', 'psig');
say('psia psi(a) psiabs psiabsolute', 'psia');
say('psid psi(d) psidiff δpsi deltapsi dpsi', 'psid');
say('kpa kilopascal kilopascals', 'kPag', 'kPa', 'kPad');
say('kpag kpa(g) kpagauge kpa-g kpa_g', 'kPag');
say('kpaa kpa(a) kpaabs kpa(abs) kpaabsolute kpa-a', 'kPa');
say('kpad kpadiff δkpa deltakpa', 'kPad');
say('bar bars', 'barg', 'bar', 'bard');
say('barg bar(g) bargauge bar-g baru barü', 'barg');
say('bara bar(a) barabs bar(abs) bar-a', 'bar');
say('bard bardiff δbar', 'bard');
say('mpa mpaa mpa(a) mpaabs megapascal', 'MPa');
say('inhg "hg inhgvac', 'inHg');
say('l/s lps l/sec ls liters/second litres/second liter/s ltr/s liters_per_second', 'lps');
say('gpm usgpm gal/min gallons/min gal/m galmin gallons_per_minute', 'gpm');
say('m3/h m³/h m3/hr m³/hr m3h cmh m^3/h cubic_meters_per_hour cum/h', 'm3h');
say('kw kilowatt kilowatts kwe', 'kW', 'kWduty');
say('w watt watts', 'W');
say('ton tons tr rt tonsref tonref tonsr tonrefrigeration', 'tons');
say('% pct percent percentage %open %load %speed prc', 'pct');
say('%rla %fla %rated pctrla pctfla percentrla percentfla rla fla rla% fla% %ofrla %amps', 'pctRated');
say('hz hertz', 'Hz');
say('rpm r/min rev/min u/min', 'rpm');
say('a amp amps ampere amperes', 'A');
say('v volt volts vac', 'V');
say('s sec secs second seconds', 's');
say('h hr hrs hour hours std', 'h');
say('counts count starts #starts qty cycles', 'count');
say('on/off onoff off/on binary bool boolean digital run/stop 0/1 active/inactive true/false yes/no off;on', 'onoff');

const NONE = new Set([
	'',
	'-',
	'--',
	'n/a',
	'na',
	'none',
	'no units',
	'nounits',
	'unitless',
	'noun',
	'enum',
	'text',
	'string'
]);

/** A unit word made comparable: lower case, degree signs as `deg`, blanks and brackets around it gone. */
export function tidyUnit(text: string): string {
	let t = text.normalize('NFKC').trim().toLowerCase();
	t = t.replace(/^[[({<]+|[\])}>]+$/g, (m) => (m === ')' && /\([a-z]+$/.test(t.slice(0, -1)) ? m : ''));
	return t
		.replace(/[°º˚]|\bdeg\.\s*|\bdegrees?\s+|\bdeg\s+/g, 'deg')
		.replace(/ã?â°|â°|ï¿½|\ufffd/g, 'deg')
		.replace(/[∆Δδ]/g, 'δ')
		.replace(/μ/g, 'u')
		.replace(/[\s_]+(?=.)/g, '')
		.replace(/\.$/, '');
}

/** What a unit word may mean, or null when it is no unit of measure that the product knows. */
export function unitOf(text: string): UnitMeaning | null {
	const t = tidyUnit(text);
	return Object.hasOwn(WORDS, t) ? (WORDS[t] ?? null) : null;
}

/** Is the cell a unit word, or one of the marks that stand for "no unit" in a row of units? */
export function isUnitCell(text: string): boolean {
	return NONE.has(text.trim().toLowerCase()) || unitOf(text) !== null;
}

/** Which unit of a meaning serves a quantity, likeliest first; empty when none does. */
export function measuresFor(meaning: UnitMeaning, quantity: Quantity): MeasureKey[] {
	return meaning.filter((key) => {
		const q = MEASURES[key].quantity;
		return q === quantity || (quantity === 'current' && key === 'pctRated');
	});
}

/** Stored-unit bounds outside which no working sensor of the quantity reads. */
export const POSSIBLE: Readonly<Partial<Record<Quantity, readonly [number, number]>>> = {
	temperature: [-60, 220],
	temperatureDifference: [-100, 150],
	pressure: [-8, 6000],
	pressureDifference: [-1500, 4000],
	flow: [-50, 4000],
	power: [-100, 20_000],
	duty: [-500, 60_000],
	percent: [-20, 200],
	frequency: [-1, 1000],
	current: [-20, 6000],
	voltage: [-5, 30_000],
	count: [0, 1e9],
	hours: [0, 1e7],
	state: [0, 1]
};
