import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll } from 'vitest';

/** A mail server that takes every message and keeps it as text; `refuse` makes it turn messages away. */
export type Post = { messages: { to: string[]; raw: string }[]; refuse: boolean };

/** Runs a mail server for the calling test file and points the product at it. */
export function usePost(): Post {
	const post: Post = { messages: [], refuse: false };
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['STARTTLS', 'AUTH'],
		onMailFrom(_address, _session, done) {
			done(post.refuse ? new Error('no mail today') : null);
		},
		onData(stream, session, done) {
			const chunks: Buffer[] = [];
			stream.on('data', (chunk: Buffer) => chunks.push(chunk));
			stream.on('end', () => {
				const to = session.envelope.rcptTo.map(({ address }) => address);
				post.messages.push({ to, raw: Buffer.concat(chunks).toString() });
				done();
			});
		}
	});
	beforeAll(async () => {
		await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
		const address = server.server.address();
		if (address === null || typeof address === 'string') throw new Error('no port');
		process.env.SMTP_URL = `smtp://127.0.0.1:${address.port}`;
		process.env.ORIGIN = 'https://firstpull.test';
	});
	afterAll(() => new Promise<void>((done) => server.close(done)));
	return post;
}

/** The text of a message's parts, transfer encodings undone, soft line breaks joined. */
export function plainText(raw: string): string {
	const joined = raw.replaceAll(/=\r\n/g, '');
	const bytes = joined.replaceAll(/=([0-9A-F]{2})/g, (_all, hex: string) =>
		String.fromCharCode(Number.parseInt(hex, 16))
	);
	return Buffer.from(bytes, 'latin1').toString('utf8');
}

/** The bytes of a message's attachment by its file name. */
export function attachmentOf(raw: string, name: RegExp): Buffer | null {
	for (const part of raw.split(/\r\n--[^\r\n]+\r\n/)) {
		const [head = '', ...rest] = part.split('\r\n\r\n');
		if (/base64/i.test(head) && name.test(head)) return Buffer.from(rest.join('\r\n\r\n'), 'base64');
	}
	return null;
}
