import { BE_THERE } from '../proof/be-there-by';
import { AFTERNOON_FROM, MORNING_BEFORE } from '../comparison/cross-table';
import { LANDMARKS } from '../comparison/aligned-traces';
import type { MethodSection } from './types';

const hour = (minutes: number) => `${String(Math.floor(minutes / 60)).padStart(2, '0')}:00`;

/** Comparison, chance, proof and planning. */
export const STATISTICS_SECTION: MethodSection = {
	key: 'statistics',
	title: 'Comparing two groups of starts',
	lead: 'The unit of analysis is the episode: m episodes opened by an eligible first try, k of them whose first try was a start-up trip. Lost, unclear, attended and lay-up starts are shown and not counted.',
	entries: [
		{
			name: 'Interval of a share',
			says: 'Wilson’s score interval, 95 %.',
			origin: 'source',
			source: 'Wilson, J. Am. Stat. Assoc. 22 (1927) 209; checked on Newcombe, Stat. Med. 17 (1998) 857'
		},
		{
			name: 'Two shares',
			says: 'Fisher’s exact test; with six days or more that hold both kinds, exact sign-flips by day; else whole days are permuted, whole weeks when days resemble their neighbours.',
			origin: 'source',
			source: 'Fisher, The Design of Experiments (1935)'
		},
		{
			name: 'Effective counts',
			says: 'Days that resemble their neighbours count less. ρ is the correlation of first-try outcomes from day to day, drawn toward zero in short records and kept within 0 and 0.8.',
			formula: 'd = (1 + ρ) / (1 − ρ); k / d of m / d',
			origin: 'ours'
		},
		{
			name: 'Two groups of figures',
			says: 'Medians, the Hodges–Lehmann shift with the coverage it achieves, the share of pairs in which one is above the other, and the exact Mann–Whitney test with ties. Tested only where the counts could show anything at all.',
			formula: 'tested when 2 / C(n₁ + n₂, n₁) ≤ 0.05',
			origin: 'source',
			source: 'Mann & Whitney, Ann. Math. Stat. 18 (1947) 50; Hodges & Lehmann, Ann. Math. Stat. 34 (1963) 598'
		},
		{
			name: 'Several tests at once',
			says: 'At most eight discriminators, declared beforehand, form one Benjamini–Hochberg family; every other difference is exploratory.',
			origin: 'source',
			source: 'Benjamini & Hochberg, J. R. Stat. Soc. B 57 (1995) 289'
		},
		{
			name: 'Traces',
			says: `Compared at ${LANDMARKS.join(', ')} s among the starts that still run, up to a common horizon, the 10th percentile of the trip times. An envelope ends where its group falls below 80 % of itself.`,
			origin: 'ours'
		},
		{
			name: 'Slopes',
			says: 'Theil–Sen: the median of all pairwise slopes.',
			origin: 'source',
			source: 'Sen, J. Am. Stat. Assoc. 63 (1968) 1379'
		},
		{
			name: 'Morning and afternoon',
			says: `By the site’s clock, before ${hour(MORNING_BEFORE)} and from ${hour(AFTERNOON_FROM)}, beside rest and condenser water. Where these go together they are not told apart, and the page says so.`,
			origin: 'ours'
		},
		{
			name: 'What is said first',
			says: 'Sentences lead with the differences that tell most: how surely one group lies above the other, then by how much. What is certain but under 3 % of capacity, 0.6 K or 20 kPa is left to the table.',
			origin: 'ours'
		},
		{
			name: 'Next checks',
			says: 'Ordered by what they separate: how evenly a check splits the weight of the leading suspects into those it decides, p, and the rest; less a little for each tool and for stopping the unit.',
			formula: '4 · p · (1 − p) − 0.02 × tools − 0.08 if the unit must be off',
			origin: 'ours'
		},
		{
			name: 'A new method version',
			says: 'Every unit is computed again, and what the version before said of a start stands beside the present wherever they differ.',
			origin: 'ours'
		},
		{
			name: 'Baseline',
			says: 'A unit’s own held starts at like conditions come before any usual value.',
			formula: 'median ± max(floor, 3 × median absolute deviation)',
			origin: 'ours'
		}
	]
};

export const PROOF_SECTION: MethodSection = {
	key: 'proof',
	title: 'Proof after a change, and the next start',
	lead: 'Proof says that something changed, not what. It holds at every look, so a page may be opened each morning.',
	entries: [
		{
			name: 'Before',
			says: 'Eligible episodes of the 28 days before the change, without the trip that opened the case: that one was selected. Without a trip left there is too little to prove anything by.',
			origin: 'ours'
		},
		{
			name: 'Exposed starts',
			says: 'Unattended first starts after the change whose rest, water and outdoor conditions lie within 2 K of those of the failing ones. Every start left out is listed with its reason.',
			origin: 'ours'
		},
		{
			name: 'E',
			says: 'How many times better the starts since the change are foretold by a rate of their own than by the old one. Changed is proved over 1/α at five clean exposed starts or more over a week.',
			formula:
				'E = [B(½ + t, 9½ + c) / B(½, 9½)] ÷ [B(A + t, C + c) / B(A, C)], A = k′ + ½, C = m′ − k′ + ½; α_j = 0.05 / (j (j + 1))',
			origin: 'source',
			source: 'Ville, Étude critique de la notion de collectif (1939): an inequality valid at every look'
		},
		{
			name: 'Repeaters',
			says: 'Rate since the last change with weights halved every 14 days, drawn toward the office’s rate, ranked by its 10th percentile times the first starts expected in 14 days: one of one does not outrank twelve of twenty.',
			origin: 'ours'
		},
		{
			name: 'Be there by',
			says: `The ${BE_THERE.quantile * 100}th percentile of the unattended first-start clocks of the same kind of weekday over ${BE_THERE.days} days, less ${BE_THERE.marginMinutes} min; with fewer than ${BE_THERE.least} such starts no time is given.`,
			origin: 'ours'
		}
	]
};
