import type { UnitSystem } from '$lib/model/quantities';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import { listCases } from '$lib/server/repositories/circle';
import { findPerson } from '$lib/server/repositories/identity';
import { findSite, findUnit, listLimits, type SiteRow, type UnitRow } from '$lib/server/repositories/plant';
import { listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { limitAt, type LimitHistory } from '$lib/model/unit';
import { formatDuration } from '$lib/utils/clock';
import { formatStored } from '$lib/utils/format';
import { briefCautions } from './brief-cautions';
import { caseNumber } from './case-shapes';
import { repeatTripOf, type RepeatTrip } from './case-suggestions';
import { origin, queueLetter } from './mails';
import { onCallFor } from './on-call';
import { limitsOf } from './plant-shapes';
import { shortDate, siteClock, siteDate } from './site-clock';

/** At once: a start-up trip that repeats is mailed to the person on call, once a circuit and day. */

type Told = {
	unit: UnitRow;
	site: SiteRow;
	circuit: string;
	repeat: RepeatTrip;
	openCase: string | null;
	limits: LimitHistory;
};

function factsOf({ site, repeat, limits }: Told, system: UnitSystem): [string, string][] {
	const { record, startedAt } = repeat.latest;
	const { trip, figures } = record;
	const facts: [string, string][] = [
		[
			'Started',
			`${shortDate(siteDate(startedAt, site.timeZone))} ${siteClock(startedAt, site.timeZone)}, site’s clock`
		],
		['Ran', formatDuration(((trip?.at ?? startedAt) - startedAt) / 1000)],
		[
			'Trip',
			`${TRIP_KIND_WORDS[trip?.kind ?? 'unknown']}, ${trip?.basis ?? 'inferred'}${trip?.text ? `: ${trip.text}` : ''}`
		]
	];
	const cutout = limitAt(limits, 'evapSaturationCutout', startedAt);
	if (figures.minEvapSaturation !== null) {
		const least = formatStored(figures.minEvapSaturation, 'temperature', system);
		facts.push([
			'Evap. saturation, least',
			cutout ? `${least}, cut-out ${formatStored(cutout.value, 'temperature', system)}` : least
		]);
	}
	return facts;
}

async function tell(organisationId: string, told: Told): Promise<void> {
	const { unit, site, circuit, repeat, openCase } = told;
	const { latest, count } = repeat;
	const kind = latest.record.trip?.kind ?? 'unknown';
	const name = unit.circuits > 1 ? `${unit.tag}, circuit ${circuit}` : unit.tag;
	const day = siteDate(latest.startedAt, site.timeZone);
	for (const { personId, email } of await onCallFor(organisationId, site, 'repeat-trip')) {
		const system = (await findPerson(personId))?.preferences.units ?? 'ip';
		await queueLetter(organisationId, {
			kind: 'repeat-trip',
			to: email,
			personId,
			subject: `${name}, ${site.name}: start-up trip again, ${TRIP_KIND_WORDS[kind]}`,
			dedupeKey: `repeat-trip ${unit.id} ${circuit} ${day} ${personId}`,
			body: {
				title: `${name} at ${site.name} tripped at its start again`,
				paragraphs: [
					`${count} start-up trips of this kind in 14 days, in the logs given.`,
					openCase
						? `Case ${openCase} is open on this unit.`
						: 'No case is open on this unit. The Cases sheet suggests one.'
				],
				facts: factsOf(told, system),
				link: { words: 'Open the start sheet', href: `${origin()}/units/${unit.id}/starts/${latest.id}` },
				cautions: briefCautions(unit.refrigerant, new Set([kind])).map(({ text }) => text),
				because: 'You get this as the person on call for this site.'
			}
		});
	}
}

/** Tells about the latest start-up trips of a unit that repeat. */
export async function tellRepeatTrips(job: { organisationId: string; unitId: string }): Promise<void> {
	const told = await withOrganisation(job.organisationId, async (tx): Promise<Told[]> => {
		const unit = await findUnit(tx, job.unitId);
		const site = unit && (await findSite(tx, unit.siteId));
		if (!unit || !site) return [];
		const rows: StartRow[] = await listStarts(tx, [unit.id]);
		const open = (await listCases(tx, [unit.id])).find((row) => row.state !== 'closed');
		const limits = limitsOf(await listLimits(tx, [unit.id]));
		return Array.from({ length: unit.circuits }, (_, i) => String(i + 1)).flatMap((circuit) => {
			const repeat = repeatTripOf(rows.filter((row) => row.circuit === circuit));
			return repeat ? [{ unit, site, circuit, repeat, limits, openCase: open ? caseNumber(open) : null }] : [];
		});
	});
	for (const entry of told) await tell(job.organisationId, entry);
}
