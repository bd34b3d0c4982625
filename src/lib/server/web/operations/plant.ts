import { pageQuerySchema } from '$lib/model/wire/common';
import { siteInputSchema, siteSchema, unitInputSchema, unitPatchSchema, unitSchema } from '$lib/model/wire/site-unit';
import { daysSchema, unitSummarySchema } from '$lib/model/wire/views';
import { tripWordInputSchema, tripWordSchema, tripWordsSchema } from '$lib/model/wire/trip-word';
import { z } from 'zod';
import { operation } from '../operation';

const nextCursor = z.string().nullable();
const site = '/api/sites/{site}';
const unit = '/api/units/{unit}';

export const listSites = operation({
	method: 'get',
	path: '/api/sites',
	summary: 'The sites you may see, by name',
	right: 'read',
	query: pageQuerySchema,
	response: z.object({ sites: z.array(siteSchema), nextCursor })
});
export const addSite = operation({
	method: 'post',
	path: '/api/sites',
	summary: 'Adds a site',
	right: 'plant',
	body: siteInputSchema,
	response: siteSchema,
	status: 201
});
export const getSite = operation({
	method: 'get',
	path: site,
	summary: 'One site',
	right: 'read',
	response: siteSchema
});
export const changeSite = operation({
	method: 'patch',
	path: site,
	summary: 'Changes a site',
	right: 'plant',
	body: siteInputSchema.partial(),
	response: siteSchema
});
export const removeSite = operation({
	method: 'delete',
	path: site,
	summary: 'Removes a site that has no units',
	right: 'plant',
	status: 204
});

export const listUnits = operation({
	method: 'get',
	path: '/api/units',
	summary: 'The units you may see; view=summary gives the rows of the Units page, worst repeater first',
	right: 'read',
	query: pageQuerySchema.extend({ site: z.uuid().optional(), view: z.enum(['plain', 'summary']).default('plain') }),
	response: z.object({
		units: z.array(z.union([unitSchema, unitSummarySchema])),
		title: z.string().optional(),
		nextCursor
	})
});
export const addUnit = operation({
	method: 'post',
	path: '/api/units',
	summary: 'Adds a unit to a site; limits in °C, K, kPa absolute, %, s',
	right: 'plant',
	body: unitInputSchema,
	response: unitSchema,
	status: 201
});
export const getUnit = operation({
	method: 'get',
	path: unit,
	summary: 'One unit',
	right: 'read',
	response: unitSchema
});
export const changeUnit = operation({
	method: 'patch',
	path: unit,
	summary: 'Changes a unit; nature and limits recompute its starts',
	right: 'plant',
	body: unitPatchSchema,
	response: unitSchema
});
export const removeUnit = operation({
	method: 'delete',
	path: unit,
	summary: 'Removes a unit with its logs and all that was computed from them',
	right: 'plant',
	status: 204
});
const dateQuery = z.iso.date().optional();
export const getDays = operation({
	method: 'get',
	path: `${unit}/days`,
	summary: 'The day strips of a unit: runs on the clock of each day, with changes, visits and cases between them',
	right: 'read',
	query: z.object({ from: dateQuery, to: dateQuery, circuit: z.string().optional() }),
	response: daysSchema
});
export const listTripWords = operation({
	method: 'get',
	path: '/api/units/{unit}/trip-words',
	summary: 'Words that name a trip kind for this unit, and texts of its trips that none names',
	right: 'read',
	response: tripWordsSchema
});
export const addTripWord = operation({
	method: 'post',
	path: '/api/units/{unit}/trip-words',
	summary: 'Adds words that name a trip kind, for this unit or every unit; trips are told anew',
	right: 'plant',
	body: tripWordInputSchema,
	response: tripWordSchema,
	status: 201
});
export const removeTripWord = operation({
	method: 'delete',
	path: '/api/units/{unit}/trip-words/{word}',
	summary: 'Takes words away',
	right: 'plant',
	status: 204
});
