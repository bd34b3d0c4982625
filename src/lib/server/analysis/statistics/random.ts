/**
 * A seeded stream of numbers in [0, 1): a 32-bit counter stepped by the golden ratio and mixed (a Weyl sequence with
 * an avalanche). The same seed gives the same stream everywhere; not for secrets.
 * Source of the mixing constants: Steele, Lea & Flood, OOPSLA 2014 (splittable generators), 32-bit form.
 */
export function seededRandom(seed: number): () => number {
	let state = seed >>> 0;
	return () => {
		state = (state + 0x9e3779b9) >>> 0;
		let mixed = state;
		mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
		mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
		return ((mixed ^ (mixed >>> 16)) >>> 0) / 4294967296;
	};
}

/** A shuffled copy of `items` (Fisher–Yates). */
export function shuffled<T>(items: readonly T[], random: () => number): T[] {
	const copy = [...items];
	for (let i = copy.length - 1; i > 0; i--) {
		const j = Math.floor(random() * (i + 1));
		const [a, b] = [copy[i], copy[j]];
		if (a === undefined || b === undefined) continue;
		copy[i] = b;
		copy[j] = a;
	}
	return copy;
}
