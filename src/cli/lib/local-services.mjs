/**
 * Local stands-in for the hosted services a real office would use, when none is configured: a mail server that takes
 * every message and keeps it as a file, and, with the demo, an identity provider. Both listen on loopback only. They
 * are imported after the packages are installed.
 */
import { randomUUID } from 'node:crypto';
import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

const HOST = '127.0.0.1';
const MOST_KEPT = 200;
/** Who the local identity provider says signs in. */
const LOCAL_MEMBER = 'engineer@firstpull.test';

/** Takes every message; the last ones stand as .eml files in the data folder. */
async function startMail(folder, port) {
	const { SMTPServer } = await import('smtp-server');
	mkdirSync(folder, { recursive: true, mode: 0o700 });
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['STARTTLS', 'AUTH'],
		onData(stream, _session, done) {
			const chunks = [];
			stream.on('data', (chunk) => chunks.push(chunk));
			stream.on('error', done);
			stream.on('end', () => {
				const stamp = new Date().toISOString().replaceAll(':', '');
				writeFileSync(join(folder, `${stamp}-${randomUUID().slice(0, 8)}.eml`), Buffer.concat(chunks));
				for (const old of readdirSync(folder).sort().slice(0, -MOST_KEPT)) rmSync(join(folder, old));
				done();
			});
		}
	});
	await new Promise((done, fail) => {
		server.once('error', fail);
		server.listen(port, HOST, done);
	});
	server.on('error', (error) => console.error('mail', error.message));
	return `smtp://${HOST}:${port}`;
}

/** An OpenID Connect provider that signs everyone in as one demo member. */
async function startIdentity(port) {
	const { OAuth2Server } = await import('oauth2-mock-server');
	const server = new OAuth2Server();
	await server.issuer.keys.generate('RS256');
	await server.start(port, HOST);
	server.issuer.url = `http://${HOST}:${port}`;
	server.service.on('beforeTokenSigning', (token) => {
		Object.assign(token.payload, { sub: LOCAL_MEMBER, email: LOCAL_MEMBER, email_verified: true });
	});
	return {
		OIDC_ISSUER: server.issuer.url,
		OIDC_CLIENT_ID: 'firstpull-local',
		OIDC_CLIENT_SECRET: randomUUID()
	};
}

const isOff = (value) => value === 'off' || value === '0' || value === 'false';

/** Starts what is not configured; gives the settings that point at it. */
export async function startLocalServices(env, freePort) {
	const services = {};
	if (!env.SMTP_URL) services.SMTP_URL = await startMail(join(env.DATA_DIR, 'mail'), await freePort());
	if (!env.OIDC_ISSUER && !isOff(env.DEMO)) Object.assign(services, await startIdentity(await freePort()));
	return { env: services };
}
