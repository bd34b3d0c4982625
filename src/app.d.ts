import type { Actor } from '$lib/model/people';

declare global {
	namespace App {
		interface Locals {
			/** Who asks; null before sign-in. */
			actor: Actor | null;
			preferences: { units: 'ip' | 'si'; paper: 'day' | 'night' | 'system' };
			requestId: string;
			/** an owner who must set up two-step sign-in before anything else */
			twoStepDue: boolean;
		}
		interface Error {
			message: string;
			detail?: string;
		}
	}
}

export {};
