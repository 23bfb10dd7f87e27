import type { SignedInUser } from '#lib/contracts/user.ts';

declare global {
	namespace App {
		interface Locals {
			/** who is asking: null without a session or token */
			user: SignedInUser | null;
			/** bearer requests come from scripts: no cookie, no origin check */
			viaToken: boolean;
		}
		interface Error {
			message: string;
			/** reference into the log, for a defect of ours */
			reference?: string;
		}
	}
}

export {};
