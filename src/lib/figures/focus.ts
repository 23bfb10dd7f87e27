import { pairPlace, type PlateModel, type PlateNode } from './plateModel.ts';
import { pairsAcross } from './pairColumns.ts';

/** What is lit: a node, a pair (upper row first) or a species, by its row. */
export type PlateFocus =
	| { readonly kind: 'node'; readonly node: number }
	| { readonly kind: 'pair'; readonly i: number; readonly j: number }
	| { readonly kind: 'species'; readonly row: number };

/** Moves that do not depend on which way round the plate is drawn. */
export type Move = 'rootward' | 'tipward' | 'up' | 'down' | 'root';

export function sameFocus(a: PlateFocus | null, b: PlateFocus | null): boolean {
	return JSON.stringify(a) === JSON.stringify(b);
}

/** Preorder index of what a focus stands on in the tree: the node, the pair's common ancestor, the species' tip. */
export function focusNode(model: PlateModel, focus: PlateFocus): number {
	if (focus.kind === 'node') return focus.node;
	if (focus.kind === 'species') return model.rows.findLastIndex(({ from, to }) => from === focus.row && to === focus.row + 1);
	return model.ancestor[pairPlace(focus.i, focus.j)] ?? 0;
}

/** Whether the cell of a pair, rows i above j, is lit: the pairs across a node, the pair itself, the pairs of a species. */
export function lightsPair(model: PlateModel, focus: PlateFocus, [i, j]: readonly [number, number]): boolean {
	if (focus.kind === 'node') return model.ancestor[pairPlace(i, j)] === focus.node;
	return focus.kind === 'pair' ? focus.i === i && focus.j === j : focus.row === i || focus.row === j;
}

function focusOn(model: PlateModel, node: number): PlateFocus {
	const { from, to } = model.rows[node] ?? { from: 0, to: 0 };
	return model.nodes.some((inner) => inner.node === node) ? { kind: 'node', node } : { kind: 'species', row: Math.min(from, to) };
}

/** Tree: to the parent, to the first daughter, to the sister above or below, to the root. Stays where there is nowhere to go. */
export function moveInTree(model: PlateModel, focus: PlateFocus | null, move: Move): PlateFocus {
	if (focus === null || move === 'root') return { kind: 'node', node: 0 };
	const node = focusNode(model, focus);
	const parent = model.parent[node] ?? -1;
	if (move === 'rootward') return parent < 0 ? focusOn(model, node) : focusOn(model, parent);
	if (move === 'tipward') {
		const first = model.nodes.find((inner) => inner.node === node)?.daughters[0];
		return focusOn(model, first ?? node);
	}
	const sisters = model.nodes.find((inner) => inner.node === parent)?.daughters ?? [node];
	const place = sisters.indexOf(node) + (move === 'down' ? 1 : -1);
	return focusOn(model, sisters[place] ?? node);
}

/** Wing: out to an older pairing of rows, in to a nearer one, up and down along the names. */
export function moveInWing(model: PlateModel, focus: PlateFocus | null, move: Move): PlateFocus {
	const last = model.species.length - 1;
	if (focus?.kind !== 'pair' || move === 'root') return { kind: 'pair', i: 0, j: move === 'root' ? last : Math.min(1, last) };
	const { i, j } = focus;
	if (move === 'rootward') return j < last ? { kind: 'pair', i, j: j + 1 } : { kind: 'pair', i: Math.max(0, i - 1), j };
	if (move === 'tipward') return j - i > 1 ? { kind: 'pair', i, j: j - 1 } : focus;
	const step = move === 'down' ? 1 : -1;
	return i + step >= 0 && j + step <= last ? { kind: 'pair', i: i + step, j: j + step } : focus;
}

/** Pairs: to the column of the next older or younger node; up and down through the pairs of a column by their overlap. */
export function moveInPairs(model: PlateModel, focus: PlateFocus | null, move: Move): PlateFocus {
	const byAge = [...model.nodes].sort((a, b) => a.age - b.age || a.node - b.node);
	const youngest = byAge[0];
	if (!youngest) return { kind: 'node', node: 0 };
	if (move === 'root') return { kind: 'node', node: 0 };
	if (focus === null || focus.kind === 'species') return { kind: 'node', node: youngest.node };
	const node = focusNode(model, focus);
	const place = byAge.findIndex((inner) => inner.node === node);
	if (move === 'rootward' || move === 'tipward') {
		const next = byAge[place + (move === 'rootward' ? 1 : -1)];
		return { kind: 'node', node: next?.node ?? node };
	}
	const current = byAge[place];
	return current ? alongColumn(model, current, focus, move === 'up' ? 1 : -1) : focus;
}

function alongColumn(model: PlateModel, node: PlateNode, focus: PlateFocus, step: 1 | -1): PlateFocus {
	const pairs = pairsAcross(model, node).sort((a, b) => a.value - b.value);
	const place =
		focus.kind === 'pair' ? pairs.findIndex(({ i, j }) => i === focus.i && j === focus.j) : step > 0 ? -1 : pairs.length;
	const next = pairs[place + step];
	return next ? { kind: 'pair', i: next.i, j: next.j } : focus;
}
