import { pageRemarks, pageWords } from '#lib/analysis/words/pageWords.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import type { Started } from '#lib/server/api/startAnalysis.ts';
import { refusedBy, type Refused } from './planPage.server.ts';

/** Starts an analysis, or says why the data do not allow it. */
export async function attempt(act: () => Promise<Started>): Promise<Started | Refused> {
	try {
		return await act();
	} catch (thrown) {
		if (thrown instanceof InputError) return refusedBy(thrown);
		if (thrown instanceof Refusal) return refusalOf(thrown);
		throw thrown;
	}
}

/** The first remark is in the sentence already. */
function refusalOf({ code, message, remarks }: Refusal): Refused {
	return { code, message: pageWords(message), remarks: pageRemarks(remarks.filter((one) => !message.includes(one.message))) };
}
