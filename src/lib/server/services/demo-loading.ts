import type { FieldCheckFact } from '$lib/model/checks';
import type { Actor, Role } from '$lib/model/people';
import type { SuspectKey } from '$lib/model/suspect';
import { createApiKey } from '$lib/server/auth/api-keys';
import { insertCase, insertChange, insertCheck, insertVisit, updateCase } from '$lib/server/repositories/circle';
import { findOrganisation, listOrganisations, saveSettings } from '$lib/server/repositories/identity';
import { withOrganisation } from '$lib/server/repositories/transaction';
import { DEMO_PASSWORD } from './first-run';
import { actorFor, addMember, foundOrganisation } from './people';
import { siteClock, siteDate } from './site-clock';
import { addSite } from './sites';
import { addUnit } from './units';

/** Puts the demo's people, plant and history into the store. Its logs come afterwards, uploaded like a person's. */

type PlanUnit = { siteKey: string; tag: string } & Omit<Parameters<typeof addUnit>[1], 'siteId'>;
export type LoadablePlan = {
	today: number;
	organisation: string;
	sites: { key: string; name: string; timeZone: string; address: string; altitude: number }[];
	units: PlanUnit[];
	members: { email: string; name: string; role: Role; sites?: string[] }[];
	changes: {
		unit: string;
		at: number;
		kind: string;
		text: string;
		aimedAt: SuspectKey[];
		splits: boolean;
		by: string;
		case?: string;
	}[];
	visits: { unit: string; from: number; to: number; by: string; purpose: string; done: string | null; case?: string }[];
	cases: {
		key: string;
		unit: string;
		at: number;
		by: string;
		assignedTo: string | null;
		complaint: string;
		caller: string;
		since: string;
		howOften: string;
		resets: string;
	}[];
	checks: {
		unit: string;
		at: number;
		by: string;
		reading: Record<string, unknown> & { kind: FieldCheckFact['kind'] };
		indicativeReason: string | null;
		note: string;
		signed: boolean;
		suspect: SuspectKey | null;
		case?: string;
	}[];
};

export type DemoState = { seed: number; today: number; loaded: boolean; unitIds: Record<string, string> };

/** The demo's organisation and how far it was loaded, or null. */
export async function demoState(): Promise<{ organisationId: string; state: DemoState } | null> {
	for (const { id } of await listOrganisations()) {
		const state = (await findOrganisation(id))?.settings['demo'] as DemoState | undefined;
		if (state) return { organisationId: id, state };
	}
	return null;
}

export const saveDemoState = (organisationId: string, state: DemoState): Promise<void> =>
	saveSettings(organisationId, { demo: state });

type Names = { unitIds: Map<string, string>; zones: Map<string, string>; people: Map<string, Actor> };

/** Makes organisation, members, sites, units and their history. */
export async function loadDemoPlant(
	plan: LoadablePlan,
	seed: number
): Promise<{ organisationId: string; state: DemoState }> {
	const [owner] = plan.members.filter((member) => member.role === 'owner');
	if (!owner) throw new Error('the demo has no owner');
	const { organisationId } = await foundOrganisation(plan.organisation, { ...owner, password: DEMO_PASSWORD });
	const actor = await actorFor(owner.email);
	const siteIds = new Map<string, string>();
	for (const { key, ...site } of plan.sites) siteIds.set(key, (await addSite(actor, site)).id);
	const names: Names = { unitIds: new Map(), zones: new Map(), people: new Map([[owner.email, actor]]) };
	for (const member of plan.members) {
		if (member === owner) continue;
		const sites = member.sites?.flatMap((key) => siteIds.get(key) ?? []) ?? null;
		await addMember(organisationId, { ...member, password: DEMO_PASSWORD, siteIds: sites });
		names.people.set(member.email, await actorFor(member.email));
	}
	for (const { siteKey, tag, refrigerant, circuits, nature, limits } of plan.units) {
		const siteId = siteIds.get(siteKey) ?? '';
		names.unitIds.set(tag, (await addUnit(actor, { siteId, tag, refrigerant, circuits, nature, limits })).id);
		names.zones.set(tag, plan.sites.find((site) => site.key === siteKey)?.timeZone ?? 'UTC');
	}
	await loadHistory(organisationId, plan, names);
	const state = { seed, today: plan.today, loaded: false, unitIds: Object.fromEntries(names.unitIds) };
	await saveDemoState(organisationId, state);
	return { organisationId, state };
}

async function loadHistory(
	organisationId: string,
	plan: LoadablePlan,
	{ unitIds, zones, people }: Names
): Promise<void> {
	await withOrganisation(organisationId, async (tx) => {
		const caseIds = new Map<string, string>();
		const person = (email: string) => ({
			by: people.get(email)?.personId ?? '',
			byName: people.get(email)?.name ?? email
		});
		for (const entry of plan.cases) {
			const row = await insertCase(tx, {
				organisationId,
				unitId: unitIds.get(entry.unit) ?? '',
				complaint: entry.complaint,
				caller: entry.caller,
				since: entry.since,
				howOften: entry.howOften,
				resets: entry.resets,
				assignedTo: entry.assignedTo ? person(entry.assignedTo).by : null,
				openedAt: new Date(entry.at),
				openedBy: person(entry.by).by,
				timeline: [
					{ at: new Date(entry.at).toISOString(), by: person(entry.by).byName, kind: 'opened', text: entry.complaint }
				]
			});
			caseIds.set(entry.key, row.id);
		}
		const caseOf = (key: string | undefined) => (key ? (caseIds.get(key) ?? null) : null);
		for (const visit of plan.visits) {
			const zone = zones.get(visit.unit) ?? 'UTC';
			await insertVisit(tx, {
				organisationId,
				unitId: unitIds.get(visit.unit) ?? '',
				caseId: caseOf(visit.case),
				date: siteDate(visit.from, zone),
				beThereBy: siteClock(visit.from, zone),
				technicianId: person(visit.by).by,
				arrivedAt: visit.done === null ? null : new Date(visit.from),
				leftAt: visit.done === null ? null : new Date(visit.to),
				purpose: visit.purpose,
				result: visit.done,
				createdBy: person(visit.by).by
			});
			const caseId = caseOf(visit.case);
			if (caseId && visit.done === null) await updateCase(tx, caseId, { state: 'visit planned' });
		}
		for (const check of plan.checks) {
			const { kind, ...readings } = check.reading;
			await insertCheck(tx, {
				organisationId,
				unitId: unitIds.get(check.unit) ?? '',
				caseId: caseOf(check.case),
				kind,
				readings,
				indicative: check.indicativeReason !== null,
				indicativeReason: check.indicativeReason,
				note: check.note,
				at: new Date(check.at),
				...person(check.by),
				signedAt: check.signed ? new Date(check.at) : null,
				signedBy: check.signed ? person(check.by).by : null,
				suspect: check.suspect
			});
		}
		for (const change of plan.changes) {
			const { unit, at, by, case: key, ...fields } = change;
			await insertChange(tx, {
				organisationId,
				unitId: unitIds.get(unit) ?? '',
				caseId: caseOf(key),
				...fields,
				at: new Date(at),
				...person(by)
			});
			const caseId = caseOf(key);
			if (caseId) await updateCase(tx, caseId, { state: 'changed' });
		}
	});
}

/** A key for the upload of the demo's logs, good for an hour. */
export async function demoKey(): Promise<string> {
	const actor = await actorFor('engineer@firstpull.test');
	const { key } = await createApiKey({
		organisationId: actor.organisationId,
		personId: actor.personId,
		name: 'demo logs',
		role: actor.role,
		scopes: ['logs'],
		siteIds: null,
		expiresAt: new Date(Date.now() + 3_600_000)
	});
	return key;
}
