import { z } from 'zod';

const blankIsMissing = (value: unknown): unknown => (value === '' ? undefined : value);
const optional = <T extends z.ZodType>(schema: T) => z.preprocess(blankIsMissing, schema.optional());
const onOff = z.preprocess((value) => value !== 'off' && value !== '0' && value !== 'false', z.boolean());

const schema = z.object({
	DATABASE_URL: z.string().regex(/^postgres(ql)?:\/\//, 'must be a postgres:// address'),
	DATA_DIR: z.string().default('.data'),
	ORIGIN: optional(z.url()),
	DEMO: onOff.default(true),
	LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
	/** most bytes of one upload */
	UPLOAD_LIMIT: z.coerce
		.number()
		.int()
		.positive()
		.default(2 * 1024 ** 3),
	S3_ENDPOINT: optional(z.url()),
	S3_BUCKET: optional(z.string()),
	S3_REGION: z.string().default('us-east-1'),
	S3_ACCESS_KEY: optional(z.string()),
	S3_SECRET_KEY: optional(z.string()),
	SMTP_URL: optional(z.url()),
	MAIL_FROM: z.string().default('Firstpull <firstpull@firstpull.test>'),
	OIDC_ISSUER: optional(z.url()),
	OIDC_CLIENT_ID: optional(z.string()),
	OIDC_CLIENT_SECRET: optional(z.string()),
	/** a fixed clock for tests: ISO instant */
	FIXED_NOW: optional(z.iso.datetime({ offset: true }))
});
export type Config = z.infer<typeof schema>;

/**
 * Settings from an environment.
 * @throws Error that names each wrong variable
 */
export function parseConfig(env: Record<string, string | undefined>): Config {
	const parsed = schema.safeParse(env);
	if (parsed.success) return parsed.data;
	const wrong = parsed.error.issues.map((issue) => `${issue.path.join('.')} ${issue.message}`);
	throw new Error(`Wrong settings: ${wrong.join('; ')}`);
}

let cached: Config | undefined;

/** The process's settings, read from its environment at first use. */
export function config(): Config {
	cached ??= parseConfig(process.env);
	return cached;
}

/** The present instant; fixed in tests through FIXED_NOW. */
export function now(): Date {
	const fixed = config().FIXED_NOW;
	return fixed ? new Date(fixed) : new Date();
}
