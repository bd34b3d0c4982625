import { unitOf } from '../values/units';

/** A column's name taken apart: its words, and the unit of measure that stands in it. */
export type NameParts = { words: string[]; unitText: string };

const BRACKETS = /[[({<]\s*([^\])}>]{1,24}?)\s*[\])}>]/g;

/** Splits a name into lower-case words: camel case, underscores, points and slashes all part words; digits stand apart. */
export function wordsOf(name: string): string[] {
	return name
		.normalize('NFKC')
		.replace(/([a-zà-ÿ])([A-Z])/g, '$1 $2')
		.replace(/([A-Z]+)([A-Z][a-z]{2,})/g, '$1 $2')
		.replace(/([A-Za-z])(\d)/g, '$1 $2')
		.replace(/(\d)([A-Za-z])/g, '$1 $2')
		.replace(/%/g, ' pct ')
		.replace(/[ΔΔ∆δ]/g, ' delta ')
		.toLowerCase()
		.normalize('NFD')
		.replace(/[\u0300-\u036f]/g, '')
		.split(/[^a-z0-9]+/)
		.filter((word) => word !== '');
}

/** Trailing words that are units when set off by a comma, a dash or an underscore: `Evap sat, degF`, `LWT_F`, `oil_psig`. */
function trailingUnit(name: string): { rest: string; unit: string } | null {
	const m = /^(.*[^\s,;:_-])\s*(?:,|;|:|\s-\s|_|\s|\.)\s*([^\s,;:]{1,9}(?:\s?[A-Za-z]{1,3})?)$/.exec(name.trim());
	if (!m) return null;
	const [, rest = '', unit = ''] = m;
	if (!unitOf(unit)) return null;
	// A lone letter or a common word is a unit only where something sets it off: `Phase A`, `Motor Amps`, `Run Hours`.
	const setOff = /[,;_]\s*[^,;_]*$|\s-\s[^-]*$/.test(name);
	const clear = /[°º%/]|^(deg|psi|kpa|bar|gpm|l\/s|lps|hz|kw|inhg|mpa|rpm)/i.test(unit);
	if (
		/^(%|pct|percent|starts?|counts?|hours?|hrs?|amps?|volts?|rpm|hertz|hz|kw|rla|fla|%rla|%fla|on\/off)$/i.test(
			unit
		) &&
		!setOff
	) {
		return null;
	}
	return setOff || clear ? { rest, unit } : null;
}

/** Words and unit of a column's name. Brackets that hold no unit are words like any other. */
export function nameParts(name: string): NameParts {
	let unitText = '';
	let rest = name.replace(BRACKETS, (whole, inner: string) => {
		if (unitText === '' && unitOf(inner)) {
			unitText = inner;
			return ' ';
		}
		return ` ${inner} `;
	});
	if (unitText === '') {
		const tail = trailingUnit(rest);
		if (tail) {
			unitText = tail.unit;
			rest = tail.rest;
		}
	}
	return { words: wordsOf(rest), unitText };
}
