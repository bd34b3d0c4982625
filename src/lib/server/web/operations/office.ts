import {
	accountPatchSchema,
	accountSchema,
	auditLineSchema,
	codeInputSchema,
	emailInputSchema,
	endOfficeSchema,
	hitSchema,
	invitationInputSchema,
	jobSchema,
	mailSchema,
	memberPatchSchema,
	membersSchema,
	officePatchSchema,
	officeSchema,
	passwordInputSchema,
	passwordOnlySchema,
	twinInputSchema
} from '$lib/model/wire/office';
import { unitSchema } from '$lib/model/wire/site-unit';
import { z } from 'zod';
import { operation } from '../operation';

export const search = operation({
	method: 'get',
	path: '/api/search',
	summary: 'Units, cases, visits, checks and changes that hold every word',
	right: 'read',
	query: z.object({ q: z.string().max(200).default('') }),
	response: z.object({ hits: z.array(hitSchema) })
});
export const listMembers = operation({
	method: 'get',
	path: '/api/members',
	summary: 'Members of the office and open invitations',
	right: 'readOffice',
	response: membersSchema
});
export const invite = operation({
	method: 'post',
	path: '/api/members',
	summary: 'Invites somebody by mail; the link works once, within a week',
	right: 'office',
	body: invitationInputSchema,
	response: membersSchema,
	status: 201
});
export const changeMember = operation({
	method: 'patch',
	path: '/api/members/{member}',
	summary: 'Changes a member’s role and sites',
	right: 'office',
	body: memberPatchSchema,
	response: membersSchema
});
export const endMembership = operation({
	method: 'delete',
	path: '/api/members/{member}',
	summary: 'A member leaves; what they did stays under their name',
	right: 'office',
	status: 204
});
export const withdrawInvitation = operation({
	method: 'delete',
	path: '/api/invitations',
	summary: 'Takes an open invitation back by its address',
	right: 'office',
	body: z.object({ email: z.email() }),
	status: 204
});
export const getOffice = operation({
	method: 'get',
	path: '/api/office',
	summary: 'Settings of the office',
	right: 'readOffice',
	response: officeSchema
});
export const changeOffice = operation({
	method: 'patch',
	path: '/api/office',
	summary: 'Changes settings of the office',
	right: 'office',
	body: officePatchSchema,
	response: officeSchema
});
export const endOffice = operation({
	method: 'delete',
	path: '/api/office',
	summary: 'Takes the office away with everything in it; its name and your password confirm it',
	right: 'office',
	body: endOfficeSchema,
	status: 204
});
export const exportOffice = operation({
	method: 'get',
	path: '/api/office/export',
	summary: 'Everything of the office as one zip: tables, logs, photos',
	right: 'office',
	responseTypes: ['application/zip']
});
export const listAudit = operation({
	method: 'get',
	path: '/api/audit',
	summary: 'The audit trail, newest first; `before` gives older lines',
	right: 'office',
	query: z.object({
		limit: z.coerce.number().int().min(1).max(1000).default(200),
		before: z.coerce.number().int().positive().optional()
	}),
	response: z.object({ lines: z.array(auditLineSchema) })
});
export const listMails = operation({
	method: 'get',
	path: '/api/mails',
	summary: 'The outbox, newest first',
	right: 'readOffice',
	response: z.object({ mails: z.array(mailSchema) })
});
export const retryMail = operation({
	method: 'post',
	path: '/api/mails/{mail}/retry',
	summary: 'Tries a message again now',
	right: 'readOffice',
	status: 204
});
export const listJobs = operation({
	method: 'get',
	path: '/api/jobs',
	summary: 'Jobs of the office, newest first',
	right: 'readOffice',
	response: z.object({ jobs: z.array(jobSchema) })
});
export const retryJob = operation({
	method: 'post',
	path: '/api/jobs/{job}/retry',
	summary: 'Tries a failed job again',
	right: 'readOffice',
	status: 204
});
export const importPlant = operation({
	method: 'post',
	path: '/api/plant-import',
	summary:
		'Adds sites and units from a sheet (CSV or xlsx) with the columns site, time zone, address, altitude, unit, refrigerant, circuits',
	right: 'plant',
	bodyTypes: [
		'text/csv',
		'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
		'application/octet-stream'
	],
	response: z.object({ sites: z.number().int(), units: z.number().int(), known: z.number().int() }),
	status: 201
});
export const copyTwin = operation({
	method: 'post',
	path: '/api/units/{unit}/twin',
	summary: 'Sets a unit up like its twin: nature, limits, confirmed mappings',
	right: 'plant',
	body: twinInputSchema,
	response: unitSchema
});

export const getAccount = operation({
	method: 'get',
	path: '/api/account',
	summary: 'Your account: sessions, two-step sign-in, mail choices',
	right: 'read',
	response: accountSchema
});
export const changeAccount = operation({
	method: 'patch',
	path: '/api/account',
	summary: 'Changes your name and what mail you want',
	right: 'read',
	body: accountPatchSchema,
	response: accountSchema
});
export const changePassword = operation({
	method: 'post',
	path: '/api/account/password',
	summary: 'Changes your password; every other session ends',
	right: 'read',
	body: passwordInputSchema,
	status: 204
});
export const askEmailChange = operation({
	method: 'post',
	path: '/api/account/email',
	summary: 'Sends a link to your new address',
	right: 'read',
	body: emailInputSchema,
	status: 204
});
export const beginTwoStep = operation({
	method: 'post',
	path: '/api/account/two-step',
	summary: 'Makes a secret for your authenticator',
	right: 'read',
	body: passwordOnlySchema,
	response: z.object({ secret: z.string(), address: z.string() })
});
export const confirmTwoStep = operation({
	method: 'put',
	path: '/api/account/two-step',
	summary: 'Turns two-step sign-in on with a first code; the recovery codes are shown this once',
	right: 'read',
	body: codeInputSchema,
	response: z.object({ recoveryCodes: z.array(z.string()) })
});
export const endTwoStep = operation({
	method: 'delete',
	path: '/api/account/two-step',
	summary: 'Turns two-step sign-in off',
	right: 'read',
	body: passwordOnlySchema,
	status: 204
});
export const enterOffice = operation({
	method: 'put',
	path: '/api/account/office',
	summary: 'Goes over to another office you are a member of, with this session',
	right: 'read',
	body: z.object({ id: z.uuid() }),
	status: 204
});
export const endSession = operation({
	method: 'delete',
	path: '/api/account/sessions/{session}',
	summary: 'Ends one of your sessions',
	right: 'read',
	status: 204
});
