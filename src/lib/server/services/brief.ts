import { METHOD_VERSION } from '$lib/model/circuit-input';
import type { Actor } from '$lib/model/people';
import { airPressure, type UnitSystem } from '$lib/model/quantities';
import { SAFETY_CLASSES } from '$lib/model/refrigerant-safety';
import type { Suspects } from '$lib/model/wire/start';
import type { Brief } from '$lib/model/wire/visit';
import { demand } from '$lib/server/auth/guard';
import { listChanges, listChecks, listVisits } from '$lib/server/repositories/circle';
import { listLimits } from '$lib/server/repositories/plant';
import { listCircuitResults, listStarts, type CircuitResultRow, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { briefCautions } from './brief-cautions';
import { briefStarts } from './brief-starts';
import { briefStory } from './brief-story';
import { memberNames } from './checks';
import { coverageOf, dayStrips, joinCovered } from './day-strips';
import { nightsOf } from './nights';
import { limitsOf } from './plant-shapes';
import { addDays, siteDate } from './site-clock';
import { suspectsOf } from './suspects';
import { visitShape } from './visit-shapes';
import { usualBeThereBy, visibleVisit } from './visits';

/** The brief of a visit: one or two pages for who goes there. The page, the PDF and the mail print the same one. */

const STRIP_DAYS = 12;

/** The circuit the visit is about: the case's, or the one with most start-up trips. */
function circuitOf(named: string | null, rows: readonly StartRow[]): string {
	if (named) return named;
	const trips = new Map<string, number>();
	for (const row of rows) if (row.record.startupTrip) trips.set(row.circuit, (trips.get(row.circuit) ?? 0) + 1);
	return [...trips].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '1';
}

/** The checks of the brief: those that separate most first, each with what it decides. */
function checksOfBrief(checks: Suspects['nextChecks']): Brief['checks'] {
	return checks.map(({ decides, key, title, tools, cautions, unitOff }) => ({
		key,
		title,
		tools,
		cautions,
		unitOff,
		decides: decides.map((name) => name.toLowerCase()).join(', ')
	}));
}

function coverageWords(results: readonly CircuitResultRow[]): { words: string; days: { logged: number; all: number } } {
	const covered = joinCovered(results.map((row) => row.covered));
	const [from, to] = [covered[0]?.[0], covered.at(-1)?.[1]];
	if (from === undefined || to === undefined) return { words: 'no log yet', days: { logged: 0, all: 0 } };
	const all = Math.max(1, Math.ceil((to - from) / 86_400_000));
	const share = coverageOf(covered, from, to);
	return { words: `${(share * 100).toFixed(1)} %`, days: { logged: Math.round(share * all), all } };
}

/** Everything of a brief but its pictures, suspects and nights. */
async function groundOf(actor: Actor, visitId: string) {
	const names = await memberNames(actor.organisationId);
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, around } = await visibleVisit(tx, actor, visitId);
		const owner = around.cases.find((entry) => entry.id === row.caseId) ?? null;
		const all = await listStarts(tx, [row.unitId]);
		const circuit = circuitOf(owner?.circuit ?? null, all);
		const mine = (entry: { circuit: string | null }): boolean => entry.circuit === null || entry.circuit === circuit;
		return {
			...around,
			visit: visitShape(row, { ...around, names }),
			owner,
			circuit,
			rows: all.filter((entry) => entry.circuit === circuit),
			results: (await listCircuitResults(tx, [row.unitId])).filter((entry) => entry.circuit === circuit),
			limits: limitsOf(await listLimits(tx, [row.unitId])),
			checks: (await listChecks(tx, row.unitId)).filter(mine),
			changes: (await listChanges(tx, row.unitId)).filter(mine),
			visits: await listVisits(tx, [row.unitId]),
			usual: await usualBeThereBy(tx, row.unitId, around.site, row.date)
		};
	});
}

function reasonWords({ visit, usual }: Awaited<ReturnType<typeof groundOf>>): string {
	if (!visit.beThereBy) return 'no usual first start is known';
	if (usual?.clock !== visit.beThereBy) return 'set by a person';
	return `before one first start in ten, from ${usual.firstStarts} first starts of such days, less 20 min`;
}

/** The brief of a visit, in one person's units. Not for clients. */
export async function briefOf(actor: Actor, visitId: string, system: UnitSystem): Promise<Brief> {
	demand(actor, 'readSuspects');
	const ground = await groundOf(actor, visitId);
	const { unit, site, visit, circuit, rows, results } = ground;
	const found = await suspectsOf(actor, unit.id, { circuit }, system);
	const { tonight } = await nightsOf(actor, unit.id, circuit, system);
	const records = rows.map((row) => row.record);
	const kinds = new Set(records.flatMap((record) => (record.trip ? [record.trip.kind] : [])));
	const covered = joinCovered(results.map((row) => row.covered));
	const lastAt = covered.at(-1)?.[1] ?? null;
	const lastDay = lastAt === null ? null : siteDate(lastAt, site.timeZone);
	const { words, days } = coverageWords(results);
	const pictures = await briefStarts(actor, rows, ground.limits, site.timeZone, system);
	const named = found.suspects.filter(({ standing }) => standing === 'points-to' || standing === 'fits').slice(0, 3);
	return {
		visit,
		circuit: unit.circuits > 1 ? circuit : null,
		refrigerant: unit.refrigerant,
		safetyClass: SAFETY_CLASSES[unit.refrigerant],
		place: [unit.namePlate.place, site.address].filter((text) => text).join(', '),
		beThereReason: reasonWords(ground),
		cautions: briefCautions(unit.refrigerant, kinds),
		story: briefStory(
			{
				...ground,
				records,
				days,
				suspects: named,
				verdict: found.verdict,
				timeZone: site.timeZone,
				air: airPressure(site.altitude ?? 0)
			},
			system
		),
		days: lastDay
			? dayStrips(rows, covered, addDays(lastDay, 1 - STRIP_DAYS), lastDay, site.timeZone, lastAt ?? 0)
			: [],
		...pictures,
		suspects: named.map(({ name, standing, clues }) => ({
			name,
			standing,
			clue: clues.find((clue) => clue.direction === 'for')?.sentence ?? ''
		})),
		checks: checksOfBrief(found.nextChecks),
		logNext: tonight
			? [
					tonight.sentence,
					...tonight.points.map(({ label, spacingSeconds, when }) => `${label}: every ${spacingSeconds} s, ${when}`)
				]
			: [],
		coverage: words,
		methodVersion: METHOD_VERSION,
		units: system
	};
}
