import { Resvg } from '@resvg/resvg-js';
import { join } from 'node:path';
import type { PlateInput } from '#lib/figures/plateModel.ts';
import { projectRoot } from '../folders.ts';
import { figureSettings, type FigureSettings } from './figureSettings.ts';
import { drawPlate } from './plateSvg.ts';
import { pngChunk } from './plateWingImage.ts';

export const EXPORT_FONTS = ['Arimo-Regular.ttf', 'Arimo-Italic.ttf', 'Arimo-Bold.ttf', 'Arimo-BoldItalic.ttf'] as const;

/** Where an export font lies. */
export function exportFont(name: (typeof EXPORT_FONTS)[number]): string {
	return join(projectRoot(), 'static', 'fonts', 'export', name);
}

const INCH_MM = 25.4;
const HEADER_END = 33;

/** The plate as a PNG of the chosen width and resolution, with the resolution written into the file. */
export function renderPlatePng(result: PlateInput, chosen: Partial<FigureSettings> = {}): Buffer {
	const settings = figureSettings(chosen);
	const { svg } = drawPlate(result, settings, 'mm');
	const image = new Resvg(svg, {
		fitTo: { mode: 'width', value: Math.round((settings.widthMm / INCH_MM) * settings.dpi) },
		font: {
			loadSystemFonts: false,
			fontFiles: EXPORT_FONTS.map(exportFont),
			defaultFontFamily: 'Arimo',
			sansSerifFamily: 'Arimo'
		},
		background: '#ffffff'
	}).render();
	return withResolution(image.asPng(), settings.dpi);
}

/** The picture with a pHYs chunk right after its header: pixels per metre, both ways. */
export function withResolution(png: Buffer, dpi: number): Buffer {
	const perMetre = Math.round((dpi * 1000) / INCH_MM);
	const data = Buffer.alloc(9);
	data.writeUInt32BE(perMetre, 0);
	data.writeUInt32BE(perMetre, 4);
	data[8] = 1; // the unit is the metre
	return Buffer.concat([png.subarray(0, HEADER_END), pngChunk('pHYs', data), png.subarray(HEADER_END)]);
}
