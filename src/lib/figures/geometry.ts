/** A rectangle on the sheet; unit: drawing units (CSS pixels on screen, scaled to points in exports). */
export type Rect = { readonly x: number; readonly y: number; readonly width: number; readonly height: number };

export type Point = readonly [x: number, y: number];

/** Two decimals: finer than a printer's dot at 600 dpi, and half the size of a full double in an exported file. */
export function short(value: number): string {
	return String(Math.round(value * 100) / 100);
}

/** SVG path through the points, closed on request. */
export function pathThrough(points: readonly Point[], closed = false): string {
	const steps = points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${short(x)} ${short(y)}`);
	return steps.join('') + (closed && points.length > 0 ? 'Z' : '');
}

export function right(rect: Rect): number {
	return rect.x + rect.width;
}

export function bottom(rect: Rect): number {
	return rect.y + rect.height;
}

/** The rectangle on a sheet of `sheetWidth` seen in a vertical mirror. */
export function mirrored(rect: Rect, sheetWidth: number): Rect {
	return { ...rect, x: sheetWidth - rect.x - rect.width };
}

export function clamp(value: number, low: number, high: number): number {
	return Math.min(high, Math.max(low, value));
}
