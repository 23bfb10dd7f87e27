import type { z } from 'zod';
import { Refusal } from './refusal.ts';
import { BODY_LIMIT_BYTES, inWords } from './bytes.ts';
import { checked } from './checked.ts';
import { refuseUnstorable } from './refuseUnstorable.ts';

/**
 * The JSON body of a request, checked against a schema. The size is counted while it arrives, so that a body past the
 * limit is refused before the rest of it is read.
 * @throws {Refusal} 413 `body-too-large` · 400 `malformed-json`, `malformed-body`, `unstorable-character`
 */
export async function readBody<Schema extends z.ZodType>(
	request: Request,
	schema: Schema,
	limitBytes = BODY_LIMIT_BYTES
): Promise<z.output<Schema>> {
	const value = parseJson(await readText(request, limitBytes));
	refuseUnstorable(value);
	return checked(schema, value, 'body');
}

async function readText(request: Request, limitBytes: number): Promise<string> {
	refuseAnnounced(request, limitBytes);
	const parts: Uint8Array[] = [];
	let bytes = 0;
	// Cancelling the stream would destroy the socket before the refusal is sent: the rest is left unread instead.
	for await (const part of request.body?.values({ preventCancel: true }) ?? []) {
		bytes += part.byteLength;
		if (bytes > limitBytes) throw tooLarge(limitBytes, `more than ${inWords(limitBytes)} arrived`);
		parts.push(part);
	}
	try {
		return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(parts, bytes));
	} catch {
		throw new Refusal(400, 'malformed-json', 'Expected a body in UTF-8; these bytes are not. Save or send the text as UTF-8.');
	}
}

function refuseAnnounced(request: Request, limitBytes: number): void {
	const announced = Number(request.headers.get('content-length') ?? 0);
	if (announced > limitBytes) throw tooLarge(limitBytes, `${inWords(announced)} were announced`);
}

function tooLarge(limitBytes: number, found: string): Refusal {
	// The unread rest of the body would be taken for the next request on this connection.
	return new Refusal(413, 'body-too-large', `Expected a request of at most ${inWords(limitBytes)}; ${found}.`, {
		headers: { connection: 'close' }
	});
}

function parseJson(text: string): unknown {
	if (text.trim() === '') throw new Refusal(400, 'malformed-json', 'Expected a JSON object in the body; it is empty.');
	try {
		return JSON.parse(text);
	} catch (cause) {
		const why = cause instanceof SyntaxError ? cause.message.replace(/^(.{160}).*$/s, '$1 …') : 'it cannot be read';
		throw new Refusal(400, 'malformed-json', `Expected a body of JSON; it cannot be read as such: ${why}.`);
	}
}

/** @throws {Refusal} 413 `text-too-large`, with the limit and the size found */
export function refuseLargeText(text: string, limitBytes: number, what: string): void {
	const bytes = Buffer.byteLength(text);
	if (bytes > limitBytes) {
		throw new Refusal(
			413,
			'text-too-large',
			`Expected ${what} of at most ${inWords(limitBytes)}; this one has ${inWords(bytes)}.`
		);
	}
}
