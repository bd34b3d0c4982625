import { seededRandom } from './random';

/** Beyond this many days the 2ⁿ sign patterns are drawn instead of listed. */
const EXACT_DAYS = 18;
const DRAWS = 20_000;

/**
 * Sign-flip test of differences paired by day: under no difference each day's sign is as likely plus as minus.
 * Chance that |Σ dᵢ| is as large or larger over all 2ⁿ sign patterns (exact to 18 days, else 20,000 seeded draws).
 * Days without a difference (0) keep their place; readings that are not finite are left out; none gives null.
 * Source: Fisher, The Design of Experiments (1935) §21.
 */
export function signFlip(differences: readonly number[], seed = 1): { twoSided: number; exact: boolean } | null {
	const kept = differences.filter(Number.isFinite);
	const n = kept.length;
	if (n === 0) return null;
	const seen = Math.abs(kept.reduce((sum, d) => sum + d, 0)) - 1e-9;
	if (n <= EXACT_DAYS) {
		let extreme = 0;
		for (let pattern = 0; pattern < 2 ** n; pattern++) {
			let sum = 0;
			kept.forEach((d, i) => (sum += (pattern >> i) & 1 ? d : -d));
			if (Math.abs(sum) >= seen) extreme++;
		}
		return { twoSided: extreme / 2 ** n, exact: true };
	}
	const random = seededRandom(seed);
	let extreme = 1;
	for (let draw = 0; draw < DRAWS; draw++) {
		let sum = 0;
		for (const d of kept) sum += random() < 0.5 ? d : -d;
		if (Math.abs(sum) >= seen) extreme++;
	}
	return { twoSided: extreme / (DRAWS + 1), exact: false };
}
