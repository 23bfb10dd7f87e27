import { readText } from '#lib/overlap/readText.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { inWords, LARGE_BODY_LIMIT_BYTES } from '#lib/server/api/bytes.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import { isStorable } from '#lib/server/api/refuseUnstorable.ts';

export type Upload = {
	/** file name; '' for a pasted text */
	readonly name: string;
	/** a pasted text, or the file as it arrived */
	readonly source: string | Uint8Array;
	readonly fields: Readonly<Record<string, string>>;
};

/**
 * A posted text or file with what was typed around it. The page tells the limit before anything is sent; a body past it is
 * refused before it is read.
 * @throws {Refusal} 413
 */
export async function readUpload(request: Request): Promise<Upload> {
	const announced = Number(request.headers.get('content-length') ?? Number.NaN);
	if (!(announced <= LARGE_BODY_LIMIT_BYTES)) {
		const found = Number.isNaN(announced) ? 'its size was not announced' : `this is ${inWords(announced)}`;
		throw new Refusal(413, 'body-too-large', `Expected a text of at most ${inWords(LARGE_BODY_LIMIT_BYTES)}; ${found}.`);
	}
	const form = await request.formData();
	const fields = Object.fromEntries(
		[...form].flatMap(([name, value]) => (typeof value === 'string' && name !== 'text' ? [[name, value]] : []))
	);
	const file = form.get('file');
	if (file instanceof File && (file.size > 0 || file.name !== '')) {
		return { name: fields['name'] ?? file.name, source: new Uint8Array(await file.arrayBuffer()), fields };
	}
	const text = form.get('text');
	// A form sends every line end as CR LF; the text is kept as it was typed.
	return { name: fields['name'] ?? '', source: typeof text === 'string' ? text.replaceAll('\r\n', '\n') : '', fields };
}

/**
 * The text of an upload, whatever its encoding.
 * @throws {InputError} `spreadsheet-file`, `not-text`, `empty`, `broken-characters`
 */
export function textOf({ source }: Upload): string {
	if (source.length === 0) {
		throw new InputError('empty', 'Expected a tree or a matrix; there is nothing yet. Paste a text or choose a file.');
	}
	const { text } = readText(source);
	if (!isStorable(text)) {
		throw new InputError(
			'broken-characters',
			'Expected a text of whole characters; some are broken. Save the file as UTF-8 and bring it again.'
		);
	}
	return text;
}
