import { createHash } from 'node:crypto';
import { promisify } from 'node:util';
import { gunzip, gzip } from 'node:zlib';
import { asc, eq } from 'drizzle-orm';
import { db, transaction } from '#lib/server/db/client.ts';
import { textChunks, texts } from '#lib/server/db/schema.ts';

/** Larger pieces stall the event loop of the embedded database: 1 MiB takes 51 ms, 256 KiB 14 ms. */
const CHUNK_BYTES = 256 * 1024;

const compress = promisify(gzip);
const expand = promisify(gunzip);

/**
 * Keeps a text as given. The same text twice is kept once. A text has no owner: whoever may see a material that names
 * its hash may see it, so the caller asks for the material first.
 * @returns the SHA-256 of its UTF-8 bytes, in hexadecimal
 */
export async function store(text: string): Promise<string> {
	const bytes = Buffer.from(text, 'utf8');
	const hash = createHash('sha256').update(bytes).digest('hex');
	if (await isStored(hash)) return hash;
	const packed = await compress(bytes);
	await transaction(async (tx) => {
		const added = await tx
			.insert(texts)
			.values({ hash, bytes: bytes.length })
			.onConflictDoNothing()
			.returning({ hash: texts.hash });
		// Somebody stored the same text meanwhile: it is there.
		if (added.length === 0) return;
		for (let from = 0, position = 0; from < packed.length; from += CHUNK_BYTES, position++) {
			await tx.insert(textChunks).values({ hash, position, data: packed.subarray(from, from + CHUNK_BYTES) });
		}
	});
	return hash;
}

async function isStored(hash: string): Promise<boolean> {
	const found = await db().select({ hash: texts.hash }).from(texts).where(eq(texts.hash, hash)).limit(1);
	return found.length > 0;
}

/** @throws {Error} when no text has this hash: a material always has its text */
export async function load(hash: string): Promise<string> {
	const chunks = await db()
		.select({ data: textChunks.data })
		.from(textChunks)
		.where(eq(textChunks.hash, hash))
		.orderBy(asc(textChunks.position));
	if (chunks.length === 0) throw new Error(`Expected the text ${hash} to be stored; it is not.`);
	const bytes = await expand(Buffer.concat(chunks.map((chunk) => chunk.data)));
	return bytes.toString('utf8');
}
