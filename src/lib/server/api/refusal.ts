import type { Remark } from '#lib/remarks/remark.ts';

export type RefusalStatus = 400 | 401 | 403 | 404 | 405 | 413 | 422 | 429;

/** A request that is turned down. The message is shown to the person as it stands. */
export class Refusal extends Error {
	override readonly name = 'Refusal';
	readonly status: RefusalStatus;
	readonly code: string;
	readonly remarks: readonly Remark[];
	readonly headers: Readonly<Record<string, string>>;

	constructor(
		status: RefusalStatus,
		code: string,
		message: string,
		more: { remarks?: readonly Remark[]; headers?: Readonly<Record<string, string>> } = {}
	) {
		super(message);
		this.status = status;
		this.code = code;
		this.remarks = more.remarks ?? [];
		this.headers = more.headers ?? {};
	}
}
