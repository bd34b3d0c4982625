import { SUSPECT_KEYS } from '$lib/model/suspect';
import { pageQuerySchema, unitSystemSchema } from '$lib/model/wire/common';
import {
	caseInputSchema,
	casePatchSchema,
	caseRowSchema,
	caseSchema,
	caseSuggestionSchema
} from '$lib/model/wire/case';
import {
	balanceSchema,
	changeInputSchema,
	changeSchema,
	checkInputSchema,
	checkSchema,
	photoSchema
} from '$lib/model/wire/field';
import {
	briefSchema,
	planRowSchema,
	reportInputSchema,
	reportSchema,
	visitInputSchema,
	visitPatchSchema,
	visitSchema
} from '$lib/model/wire/visit';
import { z } from 'zod';
import { operation } from '../operation';

const nextCursor = z.string().nullable();
const units = unitSystemSchema.optional();
const unit = '/api/units/{unit}';

export const listChecks = operation({
	method: 'get',
	path: `${unit}/checks`,
	summary: 'Field checks of a unit, oldest first; a client sees the signed ones',
	right: 'read',
	query: pageQuerySchema.extend({ units }),
	response: z.object({ checks: z.array(checkSchema), nextCursor })
});
export const addCheck = operation({
	method: 'post',
	path: `${unit}/checks`,
	summary: 'Records a field check; it becomes a clue. With a clientKey it may be sent again and is kept once',
	right: 'field',
	query: z.object({ units }),
	body: checkInputSchema,
	response: checkSchema,
	status: 201
});
export const checkForm = operation({
	method: 'get',
	path: `${unit}/check-form`,
	summary: 'What the check forms know of the unit: oil band, tolerances, curves',
	right: 'read',
	response: z.object({
		limits: z.record(z.string(), z.number().nullable()),
		nature: z.record(z.string(), z.unknown()),
		air: z.number()
	})
});
export const signCheck = operation({
	method: 'post',
	path: '/api/checks/{check}/sign',
	summary: 'A technician signs a check; only then may a client see the suspect it settles',
	right: 'field',
	query: z.object({ units }),
	body: z.object({ suspect: z.enum(SUSPECT_KEYS).nullable().optional() }),
	response: checkSchema
});
export const listChanges = operation({
	method: 'get',
	path: `${unit}/changes`,
	summary: 'Changes of a unit, oldest first, with the running balance of oil (L) and refrigerant (kg)',
	right: 'read',
	query: pageQuerySchema,
	response: z.object({ changes: z.array(changeSchema), oil: balanceSchema, refrigerant: balanceSchema, nextCursor })
});
export const addChange = operation({
	method: 'post',
	path: `${unit}/changes`,
	summary: 'Records a change; it splits the starts into before and after',
	right: 'field',
	body: changeInputSchema,
	response: changeSchema,
	status: 201
});
export const listPhotos = operation({
	method: 'get',
	path: `${unit}/photos`,
	summary: 'Photos of a unit that belong to no check',
	right: 'read',
	response: z.object({ photos: z.array(photoSchema) })
});
export const addPhoto = operation({
	method: 'post',
	path: `${unit}/photos`,
	summary: 'Adds a photo; the body is the picture, or multipart with the part “file”. The original is kept',
	right: 'field',
	query: z.object({
		check: z.uuid().optional(),
		checkKey: z.string().max(80).optional().meta({ description: 'the clientKey of the check it belongs to' }),
		clientKey: z.string().min(8).max(80).optional(),
		caption: z.string().max(300).default(''),
		kind: z.enum(['camera', 'thermal', 'sight-glass']).default('camera')
	}),
	bodyTypes: ['image/jpeg', 'image/png', 'image/webp', 'image/avif', 'image/tiff', 'multipart/form-data'],
	response: photoSchema,
	status: 201
});
export const viewPhoto = operation({
	method: 'get',
	path: '/api/photos/{photo}/view',
	summary: 'The photo, resized for pages',
	right: 'read',
	responseTypes: ['image/jpeg']
});
export const originalPhoto = operation({
	method: 'get',
	path: '/api/photos/{photo}/original',
	summary: 'The photo as it came',
	right: 'read',
	responseTypes: ['image/jpeg', 'image/png', 'image/webp', 'image/avif', 'image/tiff', 'image/gif']
});

export const listCases = operation({
	method: 'get',
	path: '/api/cases',
	summary: 'Cases you may see, newest first; suggestions=yes adds units that trip again and again without one',
	right: 'read',
	query: pageQuerySchema.extend({
		unit: z.uuid().optional(),
		open: z.enum(['yes', 'no']).default('no'),
		suggestions: z.enum(['yes', 'no']).default('no')
	}),
	response: z.object({
		cases: z.array(caseRowSchema),
		suggestions: z.array(caseSuggestionSchema).optional(),
		nextCursor
	})
});
export const openCase = operation({
	method: 'post',
	path: '/api/cases',
	summary: 'Opens a case from a call, a repeater or a start',
	right: 'field',
	query: z.object({ units }),
	body: caseInputSchema,
	response: caseSchema,
	status: 201
});
export const getCase = operation({
	method: 'get',
	path: '/api/cases/{case}',
	summary: 'One case with its timeline and the proof so far',
	right: 'read',
	query: z.object({ units }),
	response: caseSchema
});
export const changeCase = operation({
	method: 'patch',
	path: '/api/cases/{case}',
	summary: 'Changes a case; closed only with proof or a stated reason',
	right: 'field',
	query: z.object({ units }),
	body: casePatchSchema,
	response: caseSchema
});

export const listVisits = operation({
	method: 'get',
	path: '/api/visits',
	summary: 'Visits you may see, by date',
	right: 'read',
	query: pageQuerySchema.extend({
		unit: z.uuid().optional(),
		from: z.iso.date().optional(),
		to: z.iso.date().optional()
	}),
	response: z.object({ visits: z.array(visitSchema), nextCursor })
});
export const planVisit = operation({
	method: 'post',
	path: '/api/visits',
	summary: 'Plans a visit; be-there-by comes from the usual first start when left out',
	right: 'field',
	body: visitInputSchema,
	response: visitSchema,
	status: 201
});
export const visitPlan = operation({
	method: 'get',
	path: '/api/visit-plan',
	summary: 'Units worth a visit in a period, worst first, with the clock to be there by',
	right: 'readSuspects',
	query: z.object({ from: z.iso.date(), to: z.iso.date() }),
	response: z.object({ rows: z.array(planRowSchema) })
});
export const getVisit = operation({
	method: 'get',
	path: '/api/visits/{visit}',
	summary: 'One visit',
	right: 'read',
	response: visitSchema
});
export const changeVisit = operation({
	method: 'patch',
	path: '/api/visits/{visit}',
	summary: 'Changes a visit, or enters the times on site and the result',
	right: 'field',
	body: visitPatchSchema,
	response: visitSchema
});
export const cancelVisit = operation({
	method: 'delete',
	path: '/api/visits/{visit}',
	summary: 'Takes back a visit that did not begin',
	right: 'plan',
	status: 204
});
export const visitCalendar = operation({
	method: 'get',
	path: '/api/visits/{visit}/calendar',
	summary: 'The visit as a calendar file',
	right: 'read',
	responseTypes: ['text/calendar']
});
export const getBrief = operation({
	method: 'get',
	path: '/api/visits/{visit}/brief',
	summary: 'The brief of a visit; Accept: application/pdf gives it as PDF',
	right: 'readSuspects',
	query: z.object({ units }),
	response: briefSchema,
	responseTypes: ['application/pdf']
});
export const sendBrief = operation({
	method: 'post',
	path: '/api/visits/{visit}/brief',
	summary: 'Mails the brief with its PDF and a calendar file to who goes there',
	right: 'plan',
	response: z.object({ to: z.string() })
});
export const getReport = operation({
	method: 'get',
	path: '/api/visits/{visit}/report',
	summary: 'The report of a visit, drafted from the record until a person words it; a client sees it once it was sent',
	right: 'read',
	query: z.object({ units }),
	response: reportSchema,
	responseTypes: ['application/pdf']
});
export const saveReport = operation({
	method: 'put',
	path: '/api/visits/{visit}/report',
	summary: 'Words a report; approve makes it ready to be sent',
	right: 'field',
	query: z.object({ units }),
	body: reportInputSchema,
	response: reportSchema
});
export const sendReport = operation({
	method: 'post',
	path: '/api/visits/{visit}/report',
	summary: 'Mails an approved report with its PDF to contacts of the site',
	right: 'plan',
	query: z.object({ units }),
	body: z.object({ to: z.array(z.email()).min(1).max(20) }),
	response: reportSchema
});
export const listColleagues = operation({
	method: 'get',
	path: '/api/colleagues',
	summary: 'Members who may be given work, by name',
	right: 'readSuspects',
	response: z.object({ colleagues: z.array(z.object({ id: z.uuid(), name: z.string(), role: z.string() })) })
});
