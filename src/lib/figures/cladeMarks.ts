import { pathThrough, short } from './geometry.ts';
import { rowRange } from './plateModel.ts';
import type { PlateScene } from './plateScene.ts';
import { cladeTriangle } from './wingGeometry.ts';

/** Rootward of the node, clear of its bar. */
const BRACKET_GAP = 5;
const HOOK = 4;

export type CladeMark = {
	readonly node: number;
	/** a bracket around the clade's rows, rootward of its node, open towards the tips */
	readonly bracket: string;
	/** the pairs inside the clade, on the wing */
	readonly triangle: string;
};

/** Marks of the clades that hold beyond the clade above; none of a declared group, which has no place on the tree. */
export function cladeMarks(scene: Pick<PlateScene, 'input' | 'model' | 'layout' | 'treePlace'>): CladeMark[] {
	const { input, model, layout, treePlace } = scene;
	const rootward = layout.direction === 'present-left' ? 1 : -1;
	return (input.clades ?? []).flatMap(({ node, holds }) => {
		if (!holds || node === null) return [];
		const rows = rowRange(model.rows, node);
		const x = (treePlace.x[node] ?? 0) + rootward * BRACKET_GAP;
		const hook = short(x - rootward * HOOK);
		const [top, foot] = [rows.from + 0.12, rows.to - 0.12].map((row) => short(layout.tree.y + row * layout.pitch));
		const bracket = `M${hook} ${top}H${short(x)}V${foot}H${hook}`;
		return [{ node, bracket, triangle: pathThrough(cladeTriangle(layout.wing, rows), true) }];
	});
}
