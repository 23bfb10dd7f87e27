import type { PlateFocus } from './focus.ts';
import { clamp, right, type Point } from './geometry.ts';
import type { PlateScene } from './plateScene.ts';
import { bar } from './treeLayout.ts';
import { wingCellAt } from './wingGeometry.ts';

const NEAR_MARK = 12;

/** The species under a point of the names, the node whose bar or stem is nearest in the tree. */
export function hitTree(scene: PlateScene, [x, y]: Point): PlateFocus | null {
	const { names, tree, pitch } = scene.layout;
	if (x >= names.x && x <= right(names)) {
		const row = clamp(Math.floor((y - tree.y) / pitch), 0, scene.model.species.length - 1);
		return { kind: 'species', row };
	}
	let best: PlateFocus | null = null;
	let least = Infinity;
	for (const { node, daughters, parent } of scene.model.nodes) {
		const [barX, y0, y1] = bar(scene.treePlace, node, daughters);
		const toBar = Math.hypot(x - barX, y - clamp(y, y0, y1));
		const stemY = scene.treePlace.y[node] ?? 0;
		const parentX = scene.treePlace.x[Math.max(0, parent)] ?? barX;
		const toStem = Math.hypot(x - clamp(x, Math.min(barX, parentX), Math.max(barX, parentX)), y - stemY);
		// A stem is a little further than a bar, so that where the two meet the bar wins.
		const distance = Math.min(toBar, toStem + 2);
		if (distance < least) [least, best] = [distance, { kind: 'node', node }];
	}
	return best;
}

export function hitWing(scene: PlateScene, point: Point): PlateFocus | null {
	const cell = wingCellAt(scene.layout.wing, point);
	return cell && { kind: 'pair', i: cell[0], j: cell[1] };
}

/** The nearest diamond or dot, else the node of the nearest column. */
export function hitPairs(scene: PlateScene, [x, y]: Point): PlateFocus | null {
	let best: PlateFocus | null = null;
	let least = NEAR_MARK;
	for (const dot of scene.columns.dots) {
		const distance = Math.hypot(dot.x - x, dot.y - y);
		if (distance < least) [least, best] = [distance, { kind: 'pair', i: dot.i, j: dot.j }];
	}
	for (const diamond of scene.diamonds) {
		const distance = Math.hypot(diamond.x - x, diamond.y - y) - 2;
		if (distance < least) [least, best] = [distance, { kind: 'node', node: diamond.node }];
	}
	if (best) return best;
	least = Infinity;
	for (const { node, age } of scene.model.nodes) {
		const distance = Math.abs(scene.x(age) - x);
		if (distance < least) [least, best] = [distance, { kind: 'node', node }];
	}
	return best;
}
