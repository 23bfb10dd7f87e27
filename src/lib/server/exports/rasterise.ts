import { Resvg } from '@resvg/resvg-js';
import type { DrawingTasks } from '#lib/contracts/threadTasks.ts';
import { EXPORT_FONTS, exportFont } from './exportFonts.ts';
import { INCH_MM } from './figureSettings.ts';
import { pngChunk } from './pngChunk.ts';

const HEADER_END = 33;

/** A drawing as a PNG of the asked width, with its resolution written into the file. Runs on a compute thread: a plate of 600 dpi takes a good part of a second. */
export function rasterise({ svg, widthPx, dpi }: DrawingTasks['platePng']['argument']): Buffer {
	const image = new Resvg(svg, {
		fitTo: { mode: 'width', value: widthPx },
		font: {
			loadSystemFonts: false,
			fontFiles: EXPORT_FONTS.map(exportFont),
			defaultFontFamily: 'Arimo',
			sansSerifFamily: 'Arimo'
		},
		background: '#ffffff'
	}).render();
	return withResolution(image.asPng(), dpi);
}

/** The picture with a pHYs chunk right after its header: pixels per metre, both ways. */
function withResolution(png: Buffer, dpi: number): Buffer {
	const perMetre = Math.round((dpi * 1000) / INCH_MM);
	const data = Buffer.alloc(9);
	data.writeUInt32BE(perMetre, 0);
	data.writeUInt32BE(perMetre, 4);
	data[8] = 1; // the unit is the metre
	return Buffer.concat([png.subarray(0, HEADER_END), pngChunk('pHYs', data), png.subarray(HEADER_END)]);
}
