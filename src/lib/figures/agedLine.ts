import type { AgeScale, AgeSpacing } from './ageScale.ts';
import { pathThrough, type Point } from './geometry.ts';
import type { OverlapAxis } from './overlapAxis.ts';

/** A straight line of overlap on age through (age, value). */
export type AgedLine = { readonly slope: number; readonly age: number; readonly value: number };

export type LineFrame = { readonly x: AgeScale; readonly spacing: AgeSpacing; readonly axis: OverlapAxis };

const CURVE_STEPS = 32;

export function valueAt(line: AgedLine, age: number): number {
	return line.value + line.slope * (age - line.age);
}

/**
 * Path of the line from the present to the root, as far as it stays on the overlap axis: a straight stroke on a linear
 * age axis, the curve it becomes on a logarithmic one. '' when no part of it is on the axis.
 */
export function agedLinePath(line: AgedLine, frame: LineFrame): string {
	const [from, to] = agesWithin(line, frame);
	if (!(to > from)) return '';
	const steps = frame.spacing.kind === 'linear' ? 1 : CURVE_STEPS;
	const points = Array.from({ length: steps + 1 }, (_, step): Point => {
		// Even steps of place, not of age: the curve bends most where the axis is stretched.
		const place = frame.x(from) + ((frame.x(to) - frame.x(from)) * step) / steps;
		const age = step === 0 ? from : step === steps ? to : frame.x.invert(place);
		return [place, frame.axis.scale(valueAt(line, age))];
	});
	return pathThrough(points);
}

/** Ages between the present and the root at which the line lies within the overlap axis. */
function agesWithin(line: AgedLine, { x, axis }: LineFrame): [number, number] {
	const [, oldest = 0] = x.domain();
	if (line.slope === 0) return line.value >= axis.low && line.value <= axis.high ? [0, oldest] : [0, 0];
	const a = line.age + (axis.low - line.value) / line.slope;
	const b = line.age + (axis.high - line.value) / line.slope;
	return [Math.max(0, Math.min(a, b)), Math.min(oldest, Math.max(a, b))];
}
