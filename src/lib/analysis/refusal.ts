import { InputError } from '#lib/remarks/inputError.ts';
import type { Remark } from '#lib/remarks/remark.ts';

/** The materials can be read but not analysed; carries every remark that stands in the way, not only the first. */
export class AnalysisRefusal extends InputError {
	readonly remarks: readonly Remark[];

	constructor(code: string, message: string, remarks: readonly Remark[] = []) {
		super(code, message);
		this.remarks = remarks;
	}
}
