import type { z } from 'zod';
import type { namesAnswerSchema } from '#lib/contracts/answers.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Access } from '#lib/server/access.ts';
import * as names from '#lib/server/repositories/names.ts';

type Answer = z.infer<typeof namesAnswerSchema>;

/** The decisions in force, and how the names of the newest tree set and run agree under them. */
export async function namesAnswer(access: Access): Promise<Answer> {
	const decisions = await names.current(access);
	return { decisions, matching: await matchingOf(access) };
}

async function matchingOf(access: Access): Promise<Answer['matching']> {
	try {
		const matching = await names.matching(access);
		if (matching === null) return null;
		const { sentence, pairs, dropped } = matching;
		return { sentence, pairs: [...pairs], dropped: [...dropped] };
	} catch (thrown) {
		// No name in common is something to show here, not a refusal.
		if (!(thrown instanceof InputError)) throw thrown;
		return { sentence: thrown.message, pairs: [], dropped: [] };
	}
}
