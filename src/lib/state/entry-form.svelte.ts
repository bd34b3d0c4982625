import type { SubmitFunction } from '@sveltejs/kit';

/** A form before sign-in: works without scripts; with them, what was typed stays also when no answer comes. */
export class EntryForm {
	sending = $state(false);
	/** The connection broke: nothing was lost, and it can be tried again. */
	lost = $state(false);

	/** For `use:enhance`. */
	submit: SubmitFunction = () => {
		this.sending = true;
		this.lost = false;
		return async ({ update, result }) => {
			if (result.type === 'error') this.lost = true;
			else await update({ reset: false });
			this.sending = result.type === 'redirect';
		};
	};
}
