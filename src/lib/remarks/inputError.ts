import type { Place } from './remark.ts';

/**
 * The data are at fault, not the program. The message is shown to the person as it stands: the rule broken, where,
 * and what arrived. A plain `Error` is a defect of ours and is never shown.
 */
export class InputError extends Error {
	override readonly name = 'InputError';
	readonly code: string;
	readonly where: Place | undefined;

	constructor(code: string, message: string, where?: Place, options?: ErrorOptions) {
		super(message, options);
		this.code = code;
		this.where = where;
	}
}
