import { agedLinePath, type LineFrame } from './agedLine.ts';
import type { AgeScale } from './ageScale.ts';
import { short } from './geometry.ts';
import type { PlateInput } from './plateModel.ts';
import type { TreePlace } from './treeLayout.ts';

type Trees = NonNullable<PlateInput['trees']>;

/** Rows closer than this leave no room for a bar beside the branches; drawing units. */
const LEAST_PITCH = 6;

/** The lines of single trees as one path: together a band about the line of the drawn tree. */
export function treeLinesPath({ lines }: Pick<Trees, 'lines'>, frame: LineFrame): string {
	return lines.map(({ slope, intercept }) => agedLinePath({ slope, age: 0, value: intercept }, frame)).join('');
}

/**
 * A bar along the age axis at every node that some trees hold: 95 % of its ages there, cut off at the root of the drawn tree,
 * where the axis ends. '' where rows are too close.
 */
export function ageBarsPath(
	{ nodes }: Pick<Trees, 'nodes'>,
	place: TreePlace,
	{ x, pitch }: { x: AgeScale; pitch: number }
): string {
	if (pitch < LEAST_PITCH) return '';
	const [, oldest = 0] = x.domain();
	return nodes
		.flatMap(({ node, age }) => {
			const y = place.y[node];
			if (age === null || y === undefined || age[0] >= oldest) return [];
			return [`M${short(x(age[0]))} ${short(y)}H${short(x(Math.min(oldest, age[1])))}`];
		})
		.join('');
}
