import { short } from './geometry.ts';
import type { Diamond } from './nodeDiamonds.ts';
import type { PairDot, StripBar } from './pairColumns.ts';
import { classShare, RAMP_CLASSES, rampClass } from './wingGeometry.ts';

export type ClassPath = { readonly share: number; readonly path: string };

/** Dots of one colour class as one path: two half circles each. */
export function dotPaths(dots: readonly PairDot[], radius: number): ClassPath[] {
	const r = short(radius);
	return byClass(
		dots,
		({ x, y }) =>
			`M${short(x - radius)} ${short(y)}a${r} ${r} 0 1 0 ${short(2 * radius)} 0a${r} ${r} 0 1 0 ${short(-2 * radius)} 0z`
	);
}

export function barPaths(bars: readonly StripBar[]): ClassPath[] {
	return byClass(
		bars,
		({ x, y, width, height }) => `M${short(x)} ${short(y)}h${short(width)}v${short(height)}h${short(-width)}z`
	);
}

export function diamondPath({ x, y, reach }: Pick<Diamond, 'x' | 'y' | 'reach'>): string {
	const r = short(reach);
	return `M${short(x - reach)} ${short(y)}l${r} -${r} ${r} ${r} -${r} ${r}z`;
}

function byClass<T extends { readonly share: number }>(marks: readonly T[], pathOf: (mark: T) => string): ClassPath[] {
	const paths = Array.from({ length: RAMP_CLASSES }, () => '');
	for (const mark of marks) paths[rampClass(mark.share)] += pathOf(mark);
	return paths.map((path, index) => ({ share: classShare(index), path })).filter(({ path }) => path !== '');
}
