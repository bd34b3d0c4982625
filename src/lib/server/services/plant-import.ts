import { AppError, type ErrorLine } from '$lib/model/errors';
import { maySeeSite, type Actor } from '$lib/model/people';
import { siteInputSchema, unitInputSchema } from '$lib/model/wire/site-unit';
import { demand } from '$lib/server/auth/guard';
import { listSites, listUnits } from '$lib/server/repositories/plant';
import { withOrganisation } from '$lib/server/repositories/transaction';
import Papa from 'papaparse';
import { readSheet } from 'read-excel-file/node';
import type { z } from 'zod';
import { addSite } from './sites';
import { addUnit } from './units';

/**
 * Sites and units from a sheet (CSV or xlsx), one unit a row. Columns: site, time zone, address, altitude (m), unit,
 * refrigerant, circuits. A line that does not fit is named, and nothing is added then.
 */

const COLUMNS: Readonly<Record<string, string>> = {
	site: 'site',
	'time zone': 'timeZone',
	timezone: 'timeZone',
	address: 'address',
	altitude: 'altitude',
	'altitude m': 'altitude',
	unit: 'unit',
	tag: 'unit',
	refrigerant: 'refrigerant',
	circuits: 'circuits'
};
const NEEDED = ['site', 'timeZone', 'unit', 'refrigerant'] as const;

type Line = { number: number; cells: Partial<Record<string, string>> };

/** The cells of a sheet as text. @throws AppError `invalid` for what is no sheet */
async function cellsOf(bytes: Uint8Array): Promise<string[][]> {
	if (bytes[0] === 0x50 && bytes[1] === 0x4b) {
		try {
			const rows = await readSheet(Buffer.from(bytes));
			return rows.map((row) => row.map((cell) => (cell === null ? '' : String(cell).trim())));
		} catch {
			throw new AppError('invalid', 'This spreadsheet cannot be read: send xlsx or CSV.');
		}
	}
	const text = new TextDecoder().decode(bytes).replace(/^\ufeff/, '');
	const { data } = Papa.parse<string[]>(text, { skipEmptyLines: 'greedy' });
	return data.map((row) => row.map((cell) => cell.trim()));
}

function linesOf(rows: readonly string[][]): Line[] {
	const head = (rows[0] ?? []).map(
		(cell) => COLUMNS[cell.toLowerCase().replaceAll(/[()_]/g, ' ').replaceAll(/\s+/g, ' ').trim()]
	);
	const missing = NEEDED.filter((name) => !head.includes(name));
	if (missing.length > 0)
		throw new AppError('invalid', `The first line names no column for ${missing.join(', ')}.`, {
			errors: missing.map((field) => ({ line: 1, field, message: 'no such column' }))
		});
	return rows.slice(1).flatMap((row, i) => {
		const cells: Line['cells'] = {};
		head.forEach((name, k) => {
			if (name) cells[name] = row[k] ?? '';
		});
		return Object.values(cells).some((cell) => cell) ? [{ number: i + 2, cells }] : [];
	});
}

type Plan = {
	sites: Map<string, z.output<typeof siteInputSchema>>;
	units: { site: string; line: number; input: Omit<z.output<typeof unitInputSchema>, 'siteId'> }[];
};

function planOf(lines: readonly Line[]): Plan {
	const plan: Plan = { sites: new Map(), units: [] };
	const errors: ErrorLine[] = [];
	const wrong = (line: Line, error: z.ZodError): void => {
		for (const issue of error.issues)
			errors.push({ line: line.number, field: issue.path.join('.'), message: issue.message });
	};
	const unitSchema = unitInputSchema.omit({ siteId: true });
	for (const line of lines) {
		const { site = '', timeZone, address, altitude, unit, refrigerant, circuits } = line.cells;
		const place = siteInputSchema.safeParse({
			name: site,
			timeZone,
			...(address ? { address } : {}),
			...(altitude ? { altitude: Number(altitude.replace(',', '.')) } : {})
		});
		if (!place.success) wrong(line, place.error);
		else if (!plan.sites.has(site)) plan.sites.set(site, place.data);
		const machine = unitSchema.safeParse({
			tag: unit,
			refrigerant,
			...(circuits ? { circuits: Number(circuits) } : {})
		});
		if (!machine.success) wrong(line, machine.error);
		else if (plan.units.some((other) => other.site === site && other.input.tag === machine.data.tag))
			errors.push({ line: line.number, field: 'unit', message: 'twice in this sheet' });
		else plan.units.push({ site, line: line.number, input: machine.data });
	}
	const first = errors[0];
	if (first)
		throw new AppError(
			'invalid',
			`Line ${first.line ?? ''}: ${first.field ?? ''} ${first.message}. Nothing was added.`,
			{ errors }
		);
	return plan;
}

/** Who may see some sites only imports into those. @throws AppError `forbidden` that names the line */
function demandPlaces(actor: Actor, plan: Plan, known: ReadonlyMap<string, string>): void {
	if (actor.siteIds === null) return;
	const other = plan.units.find(({ site }) => !maySeeSite(actor, known.get(site) ?? ''));
	if (other)
		throw new AppError('forbidden', `Line ${other.line}: ${other.site} is no site of yours. Nothing was added.`, {
			errors: [{ line: other.line, field: 'site', message: 'no site of yours' }]
		});
}

/** Adds what a sheet names and is not there yet; what is there is left as it is. */
export async function importPlant(
	actor: Actor,
	bytes: Uint8Array
): Promise<{ sites: number; units: number; known: number }> {
	demand(actor, 'plant');
	const plan = planOf(linesOf(await cellsOf(bytes)));
	const { sites, units } = await withOrganisation(actor.organisationId, async (tx) => ({
		sites: new Map((await listSites(tx)).map((site) => [site.name, site.id])),
		units: await listUnits(tx)
	}));
	demandPlaces(actor, plan, sites);
	const counts = { sites: 0, units: 0, known: 0 };
	for (const [name, input] of plan.sites) {
		if (sites.has(name)) continue;
		sites.set(name, (await addSite(actor, input)).id);
		counts.sites++;
	}
	for (const { site, input } of plan.units) {
		const siteId = sites.get(site) ?? '';
		if (units.some((unit) => unit.siteId === siteId && unit.tag === input.tag)) counts.known++;
		else {
			await addUnit(actor, { ...input, siteId });
			counts.units++;
		}
	}
	return counts;
}
