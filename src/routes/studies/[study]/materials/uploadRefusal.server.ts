import { Refusal } from '#lib/server/api/refusal.ts';

/** A refused upload as its sentence; anything else is a defect of ours. */
export function uploadRefusal(thrown: unknown): { message: string } {
	if (thrown instanceof Refusal) return { message: thrown.message };
	throw thrown;
}
