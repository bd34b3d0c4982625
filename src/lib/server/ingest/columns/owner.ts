import type { UnitRef } from '../types';

/** Whose column it is, told from its name; `words` are those left over for the signal. */
export type Owner = {
	unitId: string;
	circuit: string;
	words: string[];
	unknownUnit: string | null;
	circuitNamed: boolean;
};

const CIRCUIT_WORDS = new Set([
	'ckt',
	'circuit',
	'cir',
	'circ',
	'crct',
	'crkt',
	'ckts',
	'cct',
	'circuits',
	'kreis',
	'sys',
	'system',
	'ct'
]);
const COMPRESSOR_WORDS = new Set(['comp', 'compressor', 'cmp', 'compr', 'cprsr', 'cpr', 'cmpr', 'cp']);
const UNIT_WORDS = new Set(['chiller', 'chlr', 'ch', 'unit', 'machine', 'chr', 'wcc', 'acc', 'mc']);
const LETTERS: Readonly<Record<string, string>> = { a: '1', b: '2', c: '3', d: '4' };
/** Words behind which a number counts something else than circuits. */
const NOT_CIRCUIT = new Set([
	'l',
	'phase',
	'ph',
	'stage',
	'fan',
	'leg',
	'step',
	'alarm',
	'sensor',
	'r',
	'pump',
	'chwp',
	'cwp',
	'point',
	'ai',
	'no'
]);

/** May the last word name a circuit, after the word before it? A letter behind "alarm" does, a number there counts alarms. */
function mayName(last: string | undefined, before: string | undefined): boolean {
	if (before === undefined || !NOT_CIRCUIT.has(before)) return true;
	return before === 'alarm' && /^[a-d]$/.test(last ?? '');
}

function circuitOf(word: string | undefined): string | null {
	if (word === undefined) return null;
	if (/^0?[1-4]$/.test(word)) return word.replace(/^0/, '');
	return LETTERS[word] ?? null;
}

/** Words of a unit's tag: `CH-01` → `ch`, `1`. */
export function tagWords(tag: string): string[] {
	return tag
		.toLowerCase()
		.split(/[^a-z0-9]+|(?<=[a-z])(?=\d)|(?<=\d)(?=[a-z])/)
		.filter((w) => w !== '')
		.map((w) => w.replace(/^0+(?=\d)/, ''));
}

function findRun(words: readonly string[], run: readonly string[]): number {
	for (let i = 0; i + run.length <= words.length; i++) {
		if (run.every((w, k) => (words[i + k] ?? '').replace(/^0+(?=\d)/, '') === w)) return i;
	}
	return -1;
}

/** Tells units and circuits from the words of column names. One for a whole log: it looks at the names together. */
export class OwnerFinder {
	readonly #home: UnitRef;
	readonly #units: readonly UnitRef[];
	/** Several different unit numbers occur: they part the columns. A single one is only how this export names its unit. */
	readonly #numbersPart: boolean;
	/** Bare numbers at the end of names come in pairs, as circuits do. */
	readonly #bareNumbers: boolean;

	constructor(home: UnitRef, siblings: readonly UnitRef[], names: readonly (readonly string[])[]) {
		this.#home = home;
		this.#units = [home, ...siblings];
		const numbers = new Set(names.map((words) => this.#unitNumber(words)?.number).filter((n) => n !== undefined));
		this.#numbersPart = numbers.size > 1;
		this.#bareNumbers = home.circuits > 1 && this.#pairs(names);
	}

	#pairs(names: readonly (readonly string[])[]): boolean {
		const stems = new Map<string, Set<string>>();
		for (const words of names) {
			const circuit = circuitOf(words.at(-1));
			if (!circuit || !mayName(words.at(-1), words.at(-2))) continue;
			const stem = words.slice(0, -1).join(' ');
			stems.set(stem, (stems.get(stem) ?? new Set()).add(circuit));
		}
		return [...stems.values()].some((set) => set.has('1') && set.has('2'));
	}

	#unitNumber(words: readonly string[]): { at: number; number: string; width: number } | null {
		for (let i = 0; i + 1 < words.length; i++) {
			if (!UNIT_WORDS.has(words[i] ?? '')) continue;
			const next = words[i + 1] === 'no' || words[i + 1] === 'number' ? i + 2 : i + 1;
			if (/^\d{1,3}$/.test(words[next] ?? '')) {
				return { at: i, number: (words[next] ?? '').replace(/^0+(?=\d)/, ''), width: next - i + 1 };
			}
		}
		return null;
	}

	#unit(words: string[]): { unit: UnitRef; words: string[]; unknown: string | null } {
		let best: { unit: UnitRef; at: number; length: number } | null = null;
		for (const unit of this.#units) {
			const tag = tagWords(unit.tag);
			if (tag.length === 0 || (tag.length === 1 && /^\d$/.test(tag[0] ?? ''))) continue;
			const at = findRun(words, tag);
			if (at >= 0 && tag.length > (best?.length ?? 0)) best = { unit, at, length: tag.length };
		}
		if (best) {
			const rest = [...words.slice(0, best.at), ...words.slice(best.at + best.length)];
			return { unit: best.unit, words: rest, unknown: null };
		}
		const numbered = this.#unitNumber(words);
		if (!numbered) return { unit: this.#home, words, unknown: null };
		const rest = [...words.slice(0, numbered.at), ...words.slice(numbered.at + numbered.width)];
		const match = this.#units.filter((u) => tagWords(u.tag).findLast((w) => /^\d+$/.test(w)) === numbered.number);
		if (match.length === 1 && match[0]) return { unit: match[0], words: rest, unknown: null };
		const unknown = this.#numbersPart ? numbered.number : null;
		return { unit: this.#home, words: rest, unknown };
	}

	/** Owner of the column with these words. */
	owner(words: readonly string[]): Owner {
		const found = this.#unit([...words]);
		const rest = found.words;
		let circuit: string | null = null;
		for (let i = 0; i < rest.length && circuit === null; i++) {
			const word = rest[i] ?? '';
			const [next, afterNext] = [rest[i + 1], rest[i + 2]];
			if (CIRCUIT_WORDS.has(word)) {
				const skip = next === 'no' || next === 'number' ? 1 : 0;
				circuit = circuitOf(skip ? afterNext : next);
				if (circuit) rest.splice(i, 2 + skip);
				else if (i > 0 && circuitOf(rest[i - 1]) && !NOT_CIRCUIT.has(rest[i - 2] ?? '')) {
					circuit = circuitOf(rest[i - 1]);
					rest.splice(i - 1, 2);
				}
			} else if (COMPRESSOR_WORDS.has(word) && circuitOf(next)) {
				circuit = circuitOf(next);
				// `comp 1a`: the first compressor of circuit 1
				const letter = /^[1-4]$/.test(next ?? '') && /^[a-d]$/.test(afterNext ?? '') ? 1 : 0;
				rest.splice(i + 1, 1 + letter);
			} else if (word === 'c' && /^[1-4]$/.test(next ?? '')) {
				circuit = circuitOf(next);
				rest.splice(i, 2);
			}
		}
		if (circuit === null && this.#bareNumbers) circuit = this.#bare(rest);
		const known = circuit !== null && Number(circuit) <= found.unit.circuits;
		return {
			unitId: found.unit.unitId,
			circuit: known && circuit !== null ? circuit : '1',
			words: rest,
			unknownUnit: found.unknown,
			circuitNamed: known
		};
	}

	#bare(words: string[]): string | null {
		const last = circuitOf(words.at(-1));
		if (last && mayName(words.at(-1), words.at(-2))) {
			words.pop();
			return last;
		}
		const first = circuitOf(words[0]);
		if (first && /^\d$/.test(words[0] ?? '')) {
			words.shift();
			return first;
		}
		return null;
	}
}
