import { deserialize } from '$app/forms';
import type { Draft } from './draft.ts';

/** A text on the page: what was pasted, or the file, until it is kept. */
export type Held = {
	readonly key: number;
	readonly name: string;
	/** a file is sent as it is; a pasted text as a file too, so that no line end changes on the way */
	readonly blob: Blob;
	/** for editing; null where it is too long to be shown in a field */
	readonly text: string | null;
	readonly draft: Draft | null;
	readonly isBusy: boolean;
	/** why the server could not be asked */
	readonly trouble: string | null;
};

export type Answer = { readonly draft: Draft } | { readonly trouble: string } | { readonly location: string };

type Asked = Pick<Held, 'name' | 'blob'> & { readonly fields: Readonly<Record<string, string>> };

/** Sends a text with its answers to one of the page’s actions. */
export async function askServer(action: string, { name, blob, fields }: Asked): Promise<Answer> {
	const body = new FormData();
	for (const [field, value] of Object.entries(fields)) body.append(field, value);
	body.append('name', name);
	body.append('file', blob, name || 'pasted.txt');
	try {
		const headers = { accept: 'application/json', 'x-sveltekit-action': 'true' };
		const response = await fetch(action, { method: 'POST', body, headers });
		return answerOf(deserialize<{ draft: Draft }, { draft?: Draft; message?: string }>(await response.text()));
	} catch {
		return { trouble: 'The server could not be reached. Nothing is lost: the text is still here.' };
	}
}

type Result = ReturnType<typeof deserialize<{ draft: Draft }, { draft?: Draft; message?: string }>>;

function answerOf(result: Result): Answer {
	if (result.type === 'redirect') return { location: result.location };
	if (result.type === 'error') return { trouble: result.error.message ?? 'Something went wrong on our side.' };
	if (result.data?.draft !== undefined) return { draft: result.data.draft };
	const message = result.type === 'failure' ? result.data?.message : undefined;
	return { trouble: message ?? 'The answer of the server could not be read.' };
}
