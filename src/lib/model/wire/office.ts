import { z } from 'zod';
import { MAIL_CHOICES } from '../mail';
import { ROLES, SCOPES } from '../people';
import { idSchema, instantSchema } from './common';
import { passwordSchema } from './entry';

/** The office and the account: members, settings, trail, jobs, mail, sessions. */

export const invitationInputSchema = z
	.object({
		email: z.email('This is no e-mail address.'),
		name: z.string().trim().min(1, 'Give a name.').max(120),
		role: z.enum(ROLES),
		siteIds: z.array(idSchema).nullable().default(null).meta({ description: 'null: every site' })
	})
	.refine(({ role, siteIds }) => role !== 'client' || (siteIds !== null && siteIds.length > 0), {
		message: 'Choose the sites a client may see.',
		path: ['siteIds']
	})
	.meta({ id: 'InvitationInput' });

export const keyInputSchema = z
	.object({
		name: z.string().trim().min(1, 'Give the key a name.').max(80),
		role: z.enum(ROLES).default('engineer'),
		scopes: z.array(z.enum(SCOPES)).min(1).default(['write']),
		siteIds: z.array(idSchema).nullable().default(null),
		expiresAt: instantSchema.nullable().default(null)
	})
	.meta({ id: 'ApiKeyInput' });

export const memberPatchSchema = z
	.object({ role: z.enum(ROLES).optional(), siteIds: z.array(idSchema).nullable().optional() })
	.meta({ id: 'MemberPatch' });

export const membersSchema = z
	.object({
		members: z.array(
			z.object({
				id: idSchema,
				name: z.string(),
				email: z.string(),
				role: z.enum(ROLES),
				siteIds: z.array(z.string()).nullable(),
				leftAt: instantSchema.nullable(),
				since: instantSchema
			})
		),
		invitations: z.array(
			z.object({
				email: z.string(),
				name: z.string(),
				role: z.enum(ROLES),
				siteIds: z.array(z.string()).nullable(),
				sentAt: instantSchema,
				expiresAt: instantSchema
			})
		)
	})
	.meta({ id: 'Members' });

export type Members = z.infer<typeof membersSchema>;

export const officeSchema = z
	.object({
		name: z.string(),
		requireTwoStep: z.boolean().meta({ description: 'owners need two-step sign-in' }),
		onCallId: idSchema.nullable().meta({ description: 'who is told at once, where a site names nobody' })
	})
	.meta({ id: 'Office' });
export type Office = z.infer<typeof officeSchema>;
export const officePatchSchema = z
	.object({
		name: z.string().trim().min(1).max(120).optional(),
		requireTwoStep: z.boolean().optional(),
		onCallId: idSchema.nullable().optional()
	})
	.meta({ id: 'OfficePatch' });

export const twinInputSchema = z
	.object({
		from: z.uuid('Choose both units.'),
		nature: z.boolean().default(true),
		limits: z.boolean().default(true),
		mapping: z.boolean().default(true)
	})
	.meta({ id: 'TwinInput' });

export const auditLineSchema = z.object({
	id: z.number().int(),
	at: instantSchema,
	by: z.string().nullable(),
	action: z.string(),
	subject: z.string(),
	subjectId: z.string().nullable(),
	before: z.unknown(),
	after: z.unknown()
});

export type AuditLine = z.infer<typeof auditLineSchema>;

export const mailSchema = z
	.object({
		id: idSchema,
		kind: z.string(),
		to: z.string(),
		subject: z.string(),
		text: z.string(),
		attachments: z.array(z.object({ name: z.string(), type: z.string() })),
		state: z.enum(['queued', 'sent', 'failed']),
		tries: z.number().int(),
		error: z.string().nullable(),
		createdAt: instantSchema,
		triedAt: instantSchema.nullable(),
		sentAt: instantSchema.nullable()
	})
	.meta({ id: 'Mail' });

export type Mail = z.infer<typeof mailSchema>;

export const jobSchema = z.object({
	id: idSchema,
	name: z.string(),
	state: z.string(),
	data: z.record(z.string(), z.unknown()),
	about: z.string().nullable().meta({ description: 'the log, unit or message' }),
	unitId: idSchema.nullable(),
	tries: z.number().int(),
	error: z.string().nullable(),
	createdAt: instantSchema,
	startedAt: instantSchema.nullable(),
	completedAt: instantSchema.nullable()
});

export type Job = z.infer<typeof jobSchema>;

export const accountSchema = z
	.object({
		name: z.string(),
		email: z.string(),
		hasPassword: z.boolean(),
		twoStep: z.object({ on: z.boolean(), recoveryCodesLeft: z.number().int() }),
		provider: z.boolean(),
		mailChoices: z.record(z.string(), z.boolean()),
		offices: z.array(z.object({ id: idSchema, name: z.string(), role: z.enum(ROLES), present: z.boolean() })),
		sessions: z.array(
			z.object({
				id: idSchema,
				browser: z.string().nullable(),
				createdAt: instantSchema,
				seenAt: instantSchema,
				expiresAt: instantSchema,
				present: z.boolean()
			})
		)
	})
	.meta({ id: 'Account' });
export type Account = z.infer<typeof accountSchema>;

export const accountPatchSchema = z
	.object({
		name: z.string().trim().min(1).max(120).optional(),
		mailChoices: z.partialRecord(z.enum(MAIL_CHOICES as [string, ...string[]]), z.boolean()).optional()
	})
	.meta({ id: 'AccountPatch' });
export const passwordInputSchema = z.object({
	old: z.string(),
	password: passwordSchema
});
export const emailInputSchema = z.object({ email: z.email('This is no e-mail address.'), password: z.string() });
export const codeInputSchema = z.object({ code: z.string().trim().min(6, 'Give the six digits.').max(10) });
export const passwordOnlySchema = z.object({ password: z.string() });
export const endOfficeSchema = z.object({ name: z.string(), password: z.string() });

export const hitSchema = z.object({
	kind: z.enum(['unit', 'case', 'visit', 'check', 'change']),
	title: z.string(),
	detail: z.string(),
	href: z.string()
});
export type Hit = z.infer<typeof hitSchema>;
