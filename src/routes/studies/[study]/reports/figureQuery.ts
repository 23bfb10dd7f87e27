import type { FigureSettings } from '#lib/contracts/report.ts';

type Drawn = Pick<FigureSettings, 'widthMm' | 'age' | 'palette' | 'typeSizePt'>;

/** The settings of a figure as the address of a plate takes them; the resolution belongs to pictures alone. */
export function figureQuery({ widthMm, age, palette, typeSizePt }: Drawn): string {
	return new URLSearchParams({ width: String(widthMm), age, palette, type: String(typeSizePt) }).toString();
}
