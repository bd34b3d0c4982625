import { spawn } from 'node:child_process';

/** Runs a command to its end with its output shown. Rejects with the command line when it fails. */
export function run(command, args, options = {}) {
	return new Promise((done, fail) => {
		const child = spawn(command, args, { stdio: 'inherit', ...options });
		child.once('error', fail);
		child.once('exit', (code, signal) => {
			if (code === 0) done();
			else fail(new Error(`${command} ${args.join(' ')} ended with ${signal ?? `code ${code}`}`));
		});
	});
}

/** Runs a command and gives what it printed, and its code; never rejects for a non-zero code. */
export function capture(command, args, options = {}) {
	return new Promise((done, fail) => {
		const child = spawn(command, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
		let output = '';
		child.stdout.on('data', (chunk) => (output += chunk));
		child.stderr.on('data', (chunk) => (output += chunk));
		child.once('error', fail);
		child.once('exit', (code) => done({ code, output }));
	});
}

export const say = (text) => console.log(text);
export const pause = (ms) => new Promise((done) => setTimeout(done, ms));
