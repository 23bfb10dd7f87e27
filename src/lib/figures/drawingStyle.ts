import type { Palette } from './palette.ts';

/** How a drawing is inked: the same marks on screen and in exports. */
export type DrawingStyle = {
	readonly palette: Palette;
	/** font families as attribute values */
	readonly sans: string;
	readonly names: string;
	/** size of the smallest labels; drawing units */
	readonly small: number;
};
