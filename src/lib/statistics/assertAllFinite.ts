import { InputError } from '#lib/remarks/inputError.ts';

/**
 * Holds every value to be a finite number. The label is spelled out only on failure: these lists run to millions.
 *
 * @param label - what one value is, such as `age`; its place is counted from 1
 * @throws {InputError} `non-finite` names the first value that is not
 */
export function assertAllFinite(values: ArrayLike<number>, label: string): void {
	for (let i = 0; i < values.length; i++) {
		if (!Number.isFinite(values[i])) {
			throw new InputError('non-finite', `Expected ${label} ${i + 1} to be a finite number; got ${values[i]}.`);
		}
	}
}
