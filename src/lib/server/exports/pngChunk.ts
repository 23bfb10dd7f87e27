import { crc32 } from 'node:zlib';

/** One chunk of a PNG file: length, type, data, checksum. */
export function pngChunk(type: string, data: Buffer): Buffer {
	const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
	const ends = Buffer.alloc(8);
	ends.writeUInt32BE(data.length, 0);
	ends.writeUInt32BE(crc32(body), 4);
	return Buffer.concat([ends.subarray(0, 4), body, ends.subarray(4)]);
}
