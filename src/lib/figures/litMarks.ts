import { focusNode, type PlateFocus } from './focus.ts';
import { pathThrough, type Point } from './geometry.ts';
import { nodeOf, type PlateNode, type RowRange } from './plateModel.ts';
import type { Diamond } from './nodeDiamonds.ts';
import type { PairDot } from './pairColumns.ts';
import type { PlateScene } from './plateScene.ts';
import { branchPath, cladePath } from './treeLayout.ts';
import { cladeTriangle, nodeBlocks, wingBlock } from './wingGeometry.ts';

/** What one focus lights in every panel. Paths are '' and lists empty where it lights nothing. */
export type LitMarks = {
	/** outlines in the wing: a node's blocks, a pair's cell, a species' two arms */
	readonly blocks: string;
	/** the clade as a hairline triangle */
	readonly triangle: string;
	/** lines of the tree */
	readonly tree: string;
	/** the node itself, when one is lit */
	readonly knot: Point | null;
	/** the rows of each side of a node; one side for a species */
	readonly sides: readonly RowRange[];
	/** place of the lit column in d, or null */
	readonly columnX: number | null;
	readonly dots: readonly PairDot[];
	readonly diamond: Diamond | null;
};

export function litMarks(scene: PlateScene, focus: PlateFocus): LitMarks {
	if (focus.kind === 'species') return litSpecies(scene, focus.row);
	const node = nodeOf(scene.model, focusNode(scene.model, focus));
	if (!node) return { ...NOTHING };
	return focus.kind === 'node' ? litNode(scene, node) : litPair(scene, focus, node);
}

const NOTHING: LitMarks = { blocks: '', triangle: '', tree: '', knot: null, sides: [], columnX: null, dots: [], diamond: null };

function litNode(scene: PlateScene, node: PlateNode): LitMarks {
	const { wing } = scene.layout;
	return {
		blocks: nodeBlocks(wing, node.sides)
			.map((corners) => pathThrough(corners, true))
			.join(''),
		triangle: pathThrough(cladeTriangle(wing, node), true),
		tree: cladePath(scene.model, scene.treePlace, node.node),
		knot: knotOf(scene, node),
		sides: node.sides,
		columnX: scene.x(node.age),
		dots: scene.columns.dots.filter((dot) => dot.node === node.node),
		diamond: scene.diamonds.find((diamond) => diamond.node === node.node) ?? null
	};
}

function litPair(scene: PlateScene, { i, j }: { i: number; j: number }, node: PlateNode): LitMarks {
	const rows = [i, j].map((row): RowRange => ({ from: row, to: row + 1 }));
	const [upper, lower] = rows;
	const block = upper && lower ? wingBlock(scene.layout.wing, upper, lower) : [];
	return {
		...NOTHING,
		blocks: pathThrough(block, true),
		tree: rows.map(({ from }) => pathToAncestor(scene, from, node.node)).join(''),
		knot: knotOf(scene, node),
		sides: rows,
		columnX: scene.x(node.age),
		dots: scene.columns.dots.filter((dot) => dot.i === i && dot.j === j),
		diamond: node.pairCount === 1 ? (scene.diamonds.find((diamond) => diamond.node === node.node) ?? null) : null
	};
}

function litSpecies(scene: PlateScene, row: number): LitMarks {
	const { wing } = scene.layout;
	const own = { from: row, to: row + 1 };
	const arms = [
		...(row > 0 ? [wingBlock(wing, { from: 0, to: row }, own)] : []),
		...(row < wing.count - 1 ? [wingBlock(wing, own, { from: row + 1, to: wing.count })] : [])
	];
	return {
		...NOTHING,
		blocks: arms.map((corners) => pathThrough(corners, true)).join(''),
		tree: pathToAncestor(scene, row, 0),
		sides: [own],
		dots: scene.columns.dots.filter((dot) => dot.i === row || dot.j === row)
	};
}

function knotOf(scene: PlateScene, { node }: PlateNode): Point {
	return [scene.treePlace.x[node] ?? 0, scene.treePlace.y[node] ?? 0];
}

/** The way from a tip up to an ancestor, with the half bars it runs along. */
function pathToAncestor(scene: PlateScene, row: number, ancestor: number): string {
	const { model, treePlace } = scene;
	const steps: string[] = [];
	let node = focusNode(model, { kind: 'species', row });
	while (node > ancestor) {
		const parent = model.parent[node] ?? 0;
		steps.push(branchPath(treePlace, node, parent), `V${treePlace.y[parent] ?? 0}`);
		node = parent;
	}
	return steps.join('');
}
