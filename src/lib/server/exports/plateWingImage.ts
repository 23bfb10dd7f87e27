import { deflateSync } from 'node:zlib';
import type { Palette } from '#lib/figures/palette.ts';
import { classShare, RAMP_CLASSES, rampClass } from '#lib/figures/wingGeometry.ts';
import { pngChunk } from './pngChunk.ts';

/** Patches of so many pixels keep their edges in readers that smooth pictures. */
const PATCH = 6;
const MISSING = RAMP_CLASSES;
const OUTSIDE = RAMP_CLASSES + 1;

/**
 * The cells of a large wing as a PNG with a colour table, as a data address: a square with row j down and row i across,
 * filled below its diagonal and clear above. Tens of thousands of cells as vector marks would be larger and show seams.
 */
export function wingImage(count: number, shareOf: (i: number, j: number) => number, palette: Palette): string {
	const side = count * PATCH;
	const pixels = Buffer.alloc((side + 1) * side, OUTSIDE);
	for (let j = 0; j < count; j++) {
		const line = Buffer.alloc(side + 1, OUTSIDE);
		line[0] = 0; // no filter
		for (let i = 0; i < j; i++) line.fill(classOf(shareOf(i, j)), 1 + i * PATCH, 1 + (i + 1) * PATCH);
		for (let row = 0; row < PATCH; row++) line.copy(pixels, (j * PATCH + row) * (side + 1));
	}
	const colours = [...Array.from({ length: RAMP_CLASSES }, (_, index) => palette.ramp(classShare(index))), '#ffffff', '#ffffff'];
	const table = Buffer.from(colours.flatMap((hex) => [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16))));
	const clear = Buffer.alloc(colours.length, 255);
	clear[OUTSIDE] = 0;
	const header = Buffer.alloc(13);
	header.writeUInt32BE(side, 0);
	header.writeUInt32BE(side, 4);
	header.set([8, 3, 0, 0, 0], 8); // 8 bits, colour table
	const chunks = [
		pngChunk('IHDR', header),
		pngChunk('PLTE', table),
		pngChunk('tRNS', clear),
		pngChunk('IDAT', deflateSync(pixels)),
		pngChunk('IEND', Buffer.alloc(0))
	];
	const png = Buffer.concat([Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]), ...chunks]);
	return `data:image/png;base64,${png.toString('base64')}`;
}

function classOf(share: number): number {
	return Number.isNaN(share) ? MISSING : rampClass(share);
}
