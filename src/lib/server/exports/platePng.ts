import type { PlateInput } from '#lib/figures/plateModel.ts';
import { compute } from '../jobs/pool.ts';
import { figureSettings, INCH_MM, type FigureSettings } from './figureSettings.ts';
import { drawPlate } from './plateSvg.ts';

/**
 * The plate as a PNG of the chosen width and resolution. Drawn here, made into pixels on a compute thread.
 * @throws {InputError} `figure-setting`
 */
export async function renderPlatePng(result: PlateInput, chosen: Partial<FigureSettings> = {}): Promise<Uint8Array> {
	const settings = figureSettings(chosen);
	const { svg } = drawPlate(result, settings, 'mm');
	const widthPx = Math.round((settings.widthMm / INCH_MM) * settings.dpi);
	return compute('platePng', { svg, widthPx, dpi: settings.dpi });
}
