import { AsyncLocalStorage } from 'node:async_hooks';

/** What deeper code may know of the request it answers. Nothing outside a request, as in a job. */
export type Asked = {
	/** path and query, where the person wanted to go */
	readonly path: string;
	readonly isApi: boolean;
	/** reference of this request, shown to the person and kept in the log */
	readonly reference: string;
};

const scope = new AsyncLocalStorage<Asked>();

export function askedFrom(): Asked | null {
	return scope.getStore() ?? null;
}

export function inRequest<Answer>(asked: Asked, work: () => Answer): Answer {
	return scope.run(asked, work);
}
