import { ApiError } from './api';

/** Buttons that call the API: which one is busy, and what went wrong with the last. */
export class ApiAction {
	/** The name of the one that is under way. */
	busy = $state<string | null>(null);
	message = $state<string | null>(null);

	/** Runs a call; true when it went through, false when not (`message` says why). */
	async run(name: string, call: () => Promise<unknown>): Promise<boolean> {
		if (this.busy !== null) return false;
		this.busy = name;
		this.message = null;
		try {
			await call();
			return true;
		} catch (error) {
			this.message = error instanceof ApiError ? error.message : 'No answer from the server. Try again.';
			return false;
		} finally {
			this.busy = null;
		}
	}
}
