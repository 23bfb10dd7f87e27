import { render } from 'svelte/server';
import PlateDrawing from '#lib/figures/PlateDrawing.svelte';
import { writtenPalette, type Palette } from '#lib/figures/palette.ts';
import { TYPE } from '#lib/figures/plateLayout.ts';
import type { PlateInput } from '#lib/figures/plateModel.ts';
import { plateScene, wingShare, type PlateScene } from '#lib/figures/plateScene.ts';
import { plateSummary } from '#lib/figures/plateText.ts';
import { figureSettings, type FigureSettings } from './figureSettings.ts';
import { wingImage } from './plateWingImage.ts';

export type PlateSvg = { readonly svg: string; readonly widthPt: number; readonly heightPt: number };

const POINTS_PER_MM = 72 / 25.4;
/** Higher than this does not fit a page of A4 with margins. */
const MAX_HEIGHT_MM = 250;
/** Journals want no lettering under 6 pt: smaller names give way to two columns, and those to the names of clades. */
const SMALLEST_TYPE_PT = 6;
/** Narrower than this the panels have no room; the type of a very narrow figure gives way instead. */
const LEAST_WIDTH = 280;
/** A metric-compatible family first where it exists; the last one is what our own renderers embed. */
export const EXPORT_FAMILY = 'Arial, Helvetica, Arimo, sans-serif';

/** The plate as an SVG file: millimetres outside, live text, white paper. */
export function renderPlateSvg(result: PlateInput, chosen: Partial<FigureSettings> = {}): string {
	return drawPlate(result, chosen, 'mm').svg;
}

/** The same drawing with its outer size in millimetres, or in points for readers that know only those. */
export function drawPlate(result: PlateInput, chosen: Partial<FigureSettings>, unit: 'mm' | 'pt'): PlateSvg {
	const settings = figureSettings(chosen);
	const widthPt = settings.widthMm * POINTS_PER_MM;
	const pointsPerUnit = Math.min(settings.typeSizePt / TYPE, widthPt / LEAST_WIDTH);
	const scene = plateScene(result, {
		width: widthPt / pointsPerUnit,
		direction: settings.ageDirection,
		maxHeight: (MAX_HEIGHT_MM * POINTS_PER_MM) / pointsPerUnit,
		smallestName: SMALLEST_TYPE_PT / pointsPerUnit,
		abbreviateGenus: settings.abbreviateGenus,
		average: settings.average
	});
	const heightPt = scene.layout.height * pointsPerUnit;
	const perUnit = unit === 'mm' ? 1 / POINTS_PER_MM : 1;
	const size = (points: number) => `${Math.round(points * perUnit * 1000) / 1000}${unit === 'mm' ? 'mm' : ''}`;
	const palette = writtenPalette(settings.palette, 'light');
	const small = Math.max(11, Math.min(TYPE, SMALLEST_TYPE_PT / pointsPerUnit));
	const { body } = render(PlateDrawing, {
		props: {
			scene,
			style: { palette, sans: EXPORT_FAMILY, names: EXPORT_FAMILY, small },
			measureName: settings.measureName,
			unit: settings.ageUnit,
			summary: plateSummary(result, settings.measureName, settings.ageUnit),
			sheet: { width: size(widthPt), height: size(heightPt) },
			paper: true,
			wingImage: scene.wing ? null : wingPicture(scene, palette)
		}
	});
	return { svg: svgOf(body), widthPt, heightPt };
}

function wingPicture(scene: PlateScene, palette: Palette): string {
	return wingImage(scene.model.species.length, wingShare(scene.model, scene.axis), palette);
}

/** A tag with its plain numbers at three decimals, under a thousandth of a point; pictures and names stay as they are. */
function shortNumbers(tag: string): string {
	return tag.replaceAll(/ (x|y|x1|x2|y1|y2|width|height|font-size|viewBox|d)="([^"]*)"/g, (_, name: string, value: string) => {
		const rounded = value.replaceAll(/\d+\.\d{4,}/g, (long) => String(Math.round(Number(long) * 1000) / 1000));
		return ` ${name}="${rounded}"`;
	});
}

/** The drawing out of the rendered page: no container, no hydration marks, no classes. */
function svgOf(body: string): string {
	const svg = /<svg[\s\S]*<\/svg>/.exec(body)?.[0];
	if (!svg) throw new Error('Expected the plate to render one svg element; found none.');
	const bare = svg.replaceAll(/<!--[\s\S]*?-->/g, '').replaceAll(/\sclass="[^"]*"/g, '');
	return `${bare.replaceAll(/<[a-z]+ [^<>]*>/g, shortNumbers)}\n`;
}
