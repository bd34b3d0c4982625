import { z } from 'zod';
import { idSchema, instantSchema } from './common';

/** Cases: one complaint on a unit, from the call to the proof. */

export const CASE_STATES = ['open', 'visit planned', 'changed', 'proved', 'closed', 'reopened'] as const;
export type CaseState = (typeof CASE_STATES)[number];

/** What each state means, in plain words. */
export const CASE_STATE_MEANINGS: Readonly<Record<CaseState, string>> = {
	open: 'nobody has been there yet',
	'visit planned': 'somebody goes there on a known day',
	changed: 'something was changed; the starts since then must show it',
	proved: 'the starts since the change prove that something changed',
	closed: 'done, with proof or a stated reason',
	reopened: 'it came back after the change'
};

const words = (most: number) => z.string().trim().max(most);

export const caseInputSchema = z
	.object({
		unitId: idSchema,
		circuit: z.string().max(4).nullable().default(null),
		complaint: words(2000).min(1, 'write down what the caller says').meta({ description: 'in the caller’s words' }),
		caller: words(160).default(''),
		since: words(160).default(''),
		howOften: words(160).default(''),
		resets: words(300).default('').meta({ description: 'what resets do' }),
		openedFrom: z.enum(['call', 'repeater', 'start']).default('call'),
		startIds: z.array(idSchema).max(200).default([]),
		logIds: z.array(idSchema).max(200).default([]),
		assignedTo: idSchema.nullable().default(null)
	})
	.meta({ id: 'CaseInput' });
export type CaseInput = z.output<typeof caseInputSchema>;

export const casePatchSchema = z
	.object({
		complaint: words(2000).min(1).optional(),
		caller: words(160).optional(),
		since: words(160).optional(),
		howOften: words(160).optional(),
		resets: words(300).optional(),
		circuit: z.string().max(4).nullable().optional(),
		assignedTo: idSchema.nullable().optional(),
		note: words(4000).min(1).optional().meta({ description: 'a line for the timeline' }),
		startIds: z.array(idSchema).max(200).optional().meta({ description: 'attached; replaces the list' }),
		logIds: z.array(idSchema).max(200).optional(),
		comparisons: z
			.array(z.string().regex(/^\/units\/[0-9a-f-]{36}\/side-by-side(\?[^\s]*)?$/, 'is no side-by-side sheet'))
			.max(50)
			.optional()
			.meta({ description: 'addresses of side-by-side sheets' }),
		state: z.enum(['closed', 'reopened']).optional(),
		closeReason: words(1000).min(3).optional().meta({ description: 'needed to close without proof' })
	})
	.meta({ id: 'CasePatch' });
export type CasePatch = z.output<typeof casePatchSchema>;

export const timelineEntrySchema = z.object({
	at: instantSchema,
	by: z.string().nullable(),
	kind: z.string(),
	text: z.string(),
	link: z.string().nullable()
});
export type TimelineItem = z.infer<typeof timelineEntrySchema>;

export const caseProofSchema = z.object({
	changeId: idSchema,
	circuit: z.string(),
	state: z.enum(['changed', 'not-yet', 'too-little-before', 'no-exposed-start']),
	e: z.number().nullable(),
	threshold: z.number(),
	clean: z.number().int(),
	trips: z.number().int(),
	cleanStillNeeded: z.number().nullable(),
	sentences: z.array(z.string())
});
export type CaseProof = z.infer<typeof caseProofSchema>;

export const caseRowSchema = z
	.object({
		id: idSchema,
		number: z.string(),
		unitId: idSchema,
		unitTag: z.string(),
		siteId: idSchema,
		siteName: z.string(),
		timeZone: z.string(),
		circuit: z.string().nullable(),
		complaint: z.string(),
		caller: z.string(),
		since: z.string(),
		howOften: z.string(),
		resets: z.string(),
		state: z.enum(CASE_STATES),
		assignedTo: z.object({ id: idSchema, name: z.string() }).nullable(),
		openedFrom: z.string(),
		openedAt: instantSchema,
		closedAt: instantSchema.nullable(),
		closeReason: z.string().nullable(),
		nextVisit: z.object({ id: idSchema, date: z.string(), beThereBy: z.string().nullable() }).nullable(),
		lastEntry: timelineEntrySchema.nullable()
	})
	.meta({ id: 'CaseRow' });
export type CaseRow = z.infer<typeof caseRowSchema>;

export const caseSchema = caseRowSchema
	.extend({
		startIds: z.array(idSchema),
		logIds: z.array(idSchema),
		comparisons: z.array(z.string()),
		timeline: z.array(timelineEntrySchema),
		proof: caseProofSchema.nullable().meta({ description: 'since the latest change; null before one' }),
		mayClose: z.boolean().meta({ description: 'proved: it may be closed without a reason' })
	})
	.meta({ id: 'Case' });
export type Case = z.infer<typeof caseSchema>;

/** A unit that trips again and again and has no open case. */
export const caseSuggestionSchema = z.object({
	unitId: idSchema,
	unitTag: z.string(),
	siteName: z.string(),
	circuit: z.string(),
	startId: idSchema,
	at: instantSchema,
	text: z.string()
});
export type CaseSuggestion = z.infer<typeof caseSuggestionSchema>;
