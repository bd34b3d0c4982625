import type { Actor } from '$lib/model/people';

declare global {
	namespace App {
		interface Locals {
			/** Who asks; null before sign-in. */
			actor: Actor | null;
			preferences: { units: 'ip' | 'si'; paper: 'day' | 'night' | 'system' };
			requestId: string;
		}
		interface Error {
			message: string;
			detail?: string;
		}
	}
}

export {};
