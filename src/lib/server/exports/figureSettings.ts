import { InputError } from '#lib/remarks/inputError.ts';
import type { AgeDirection } from '#lib/figures/plateLayout.ts';
import type { NodeAverage } from '#lib/contracts/drawnPlate.ts';
import type { PaletteName } from '#lib/figures/palette.ts';
import type { AgeUnit } from '#lib/figures/plateText.ts';

/** What a person chooses about an exported plate. */
export type FigureSettings = {
	readonly widthMm: number;
	readonly dpi: number;
	readonly ageDirection: AgeDirection;
	readonly palette: PaletteName;
	readonly typeSizePt: number;
	readonly measureName: string;
	readonly ageUnit: AgeUnit;
	readonly abbreviateGenus: boolean;
	readonly average: NodeAverage;
};

export const FIGURE_DEFAULTS: FigureSettings = {
	widthMm: 174,
	dpi: 600,
	ageDirection: 'present-left',
	palette: 'kithline',
	typeSizePt: 7,
	measureName: 'niche overlap',
	ageUnit: 'Ma',
	abbreviateGenus: true,
	average: 'nested'
};

export const INCH_MM = 25.4;

const LIMITS = { widthMm: [30, 300], dpi: [72, 1200], typeSizePt: [6, 14] } as const;

/**
 * The settings with every default written out.
 * @throws {InputError} `figure-setting` for a width outside 30–300 mm, a resolution outside 72–1200 dpi, or type outside 6–14 pt
 */
export function figureSettings(chosen: Partial<FigureSettings> = {}): FigureSettings {
	const settings = { ...FIGURE_DEFAULTS, ...chosen };
	for (const name of ['widthMm', 'dpi', 'typeSizePt'] as const) {
		const [least, most] = LIMITS[name];
		const value = settings[name];
		if (!(value >= least && value <= most)) {
			throw new InputError(
				'figure-setting',
				`Expected ${name} between ${least} and ${most}; got ${value}. Choose a value in that range.`
			);
		}
	}
	return settings;
}
