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
		if (thrown instanceof Refusal) return { code: thrown.code, message: thrown.message, remarks: thrown.remarks };
		throw thrown;
	}
}
