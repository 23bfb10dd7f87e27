import { short } from './geometry.ts';
import type { PlateModel } from './plateModel.ts';

export type TreePlace = {
	/** shape (nodes,); horizontal place of every node, from its age */
	readonly x: Float64Array;
	/** shape (nodes,); a tip lies in the middle of its row, a node at the mean of its daughters */
	readonly y: Float64Array;
};

export type TreeRows = { readonly top: number; readonly pitch: number };

/** Lays the tree on its rows. One pass from the last node to the root, so its depth does not matter. */
export function treeLayout(model: PlateModel, xOfAge: (age: number) => number, { top, pitch }: TreeRows): TreePlace {
	const count = model.parent.length;
	const x = Float64Array.from(model.age, xOfAge);
	const y = new Float64Array(count);
	const sum = new Float64Array(count);
	const daughters = new Int32Array(count);
	for (let node = count - 1; node >= 0; node--) {
		const below = daughters[node] ?? 0;
		const row = model.rows[node]?.from ?? 0;
		y[node] = below === 0 ? top + (row + 0.5) * pitch : (sum[node] ?? 0) / below;
		const parent = model.parent[node] ?? -1;
		if (parent < 0) continue;
		sum[parent] = (sum[parent] ?? 0) + (y[node] ?? 0);
		daughters[parent] = (daughters[parent] ?? 0) + 1;
	}
	return { x, y };
}

export type Polytomy = { readonly x: number; readonly y0: number; readonly y1: number; readonly ways: number };

export type TreeInk = { readonly branches: string; readonly polytomies: readonly Polytomy[] };

/** Branches and bars as one path; a bar of three ways or more is kept apart, to be doubled and dashed. */
export function treeInk(model: PlateModel, place: TreePlace): TreeInk {
	const lines: string[] = [];
	for (const [node, parent] of model.parent.entries()) if (parent >= 0) lines.push(branchPath(place, node, parent));
	const polytomies: Polytomy[] = [];
	for (const { node, daughters } of model.nodes) {
		const [x, y0, y1] = bar(place, node, daughters);
		if (daughters.length > 2) polytomies.push({ x, y0, y1, ways: daughters.length });
		else lines.push(`M${short(x)} ${short(y0)}V${short(y1)}`);
	}
	return { branches: lines.join(''), polytomies };
}

export function branchPath(place: TreePlace, node: number, parent: number): string {
	return `M${short(place.x[node] ?? 0)} ${short(place.y[node] ?? 0)}H${short(place.x[parent] ?? 0)}`;
}

/** The vertical bar of a node, from its first to its last daughter. */
export function bar(place: TreePlace, node: number, daughters: readonly number[]): [x: number, y0: number, y1: number] {
	const first = daughters[0] ?? node;
	const last = daughters.at(-1) ?? node;
	return [place.x[node] ?? 0, place.y[first] ?? 0, place.y[last] ?? 0];
}

/** Path of everything below a node: its bar, and the branches and bars of its clade. */
export function cladePath(model: PlateModel, place: TreePlace, root: number): string {
	const rows = model.rows[root] ?? { from: 0, to: 0 };
	const lines: string[] = [];
	for (const [node, parent] of model.parent.entries()) {
		const own = model.rows[node] ?? rows;
		if (node > root && own.from >= rows.from && own.to <= rows.to) lines.push(branchPath(place, node, parent));
	}
	for (const { node, daughters, from, to } of model.nodes) {
		if (node < root || from < rows.from || to > rows.to) continue;
		const [x, y0, y1] = bar(place, node, daughters);
		lines.push(`M${short(x)} ${short(y0)}V${short(y1)}`);
	}
	return lines.join('');
}
