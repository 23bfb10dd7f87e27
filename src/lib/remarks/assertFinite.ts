import { InputError } from './inputError.ts';

/** @throws {InputError} `non-finite` when `value` is NaN or infinite; the message names it as `label`. */
export function assertFinite(value: number, label: string): void {
	if (!Number.isFinite(value)) throw new InputError('non-finite', `Expected ${label} to be a finite number; got ${value}.`);
}
