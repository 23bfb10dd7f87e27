import type { TreeShape } from './agedTree.ts';

/** Numbers per block of a form: the half-open ranges of its rows and columns, in places of `order`. */
export const FORM_BLOCK_WIDTH = 4;

/**
 * A way to sum over all pairs a function of the node where they meet, that visits between a third and a half of them.
 * Row sums do not change when species move, but for their order; so a multiple of each row sum and of the total may be
 * taken off. Walk from the root into the daughter that holds more than half of the tips, until none does: the centre.
 * With f(centre) taken off every pair, and f(v) - f(centre) off the pairs of each tip left behind at v, nothing remains
 * of the pairs that the walk has parted.
 */
export type BlockFormLayout = {
	/** shape (n,); the positions, those left behind first */
	readonly order: Int32Array;
	/** shape (blocks, 4); columns are the longer side */
	readonly blocks: Int32Array;
	/** shape (blocks,); slot of the node where the pairs of the block meet */
	readonly meeting: Int32Array;
	/** shape (blocks,); slot of the node of the walk under which they stand */
	readonly walked: Int32Array;
	/** shape (own,); slot of the node at which each tip was left behind */
	readonly leftAt: Int32Array;
	/** slot of the centre */
	readonly centre: number;
};

type Growing = {
	readonly shape: TreeShape;
	readonly slotOf: ReadonlyMap<number, number>;
	readonly order: number[];
	readonly blocks: number[];
	readonly meeting: number[];
	readonly walked: number[];
};

/** Polytomies need no resolution: the children that the walk leaves behind at a node are treated alike. */
export function blockFormLayout(shape: TreeShape): BlockFormLayout {
	const slotOf = new Map(Array.from(shape.internal, (node, slot) => [node, slot]));
	const growing: Growing = { shape, slotOf, order: [], blocks: [], meeting: [], walked: [] };
	const leftAt: number[] = [];
	let node = shape.internal[0] ?? 0;
	for (let next = largeChild(shape, node); next !== undefined; next = largeChild(shape, node)) {
		const slot = slotOf.get(node) ?? 0;
		for (const child of shape.children[node] ?? []) {
			if (child === next) continue;
			const from = growing.order.length;
			const to = from + sizeOf(shape, child);
			addBlock(growing, { rows: [0, from], columns: [from, to], meeting: slot, walked: slot });
			addClade(growing, child, slot);
			while (leftAt.length < to) leftAt.push(slot);
		}
		node = next;
	}
	const centre = slotOf.get(node) ?? 0;
	for (const child of shape.children[node] ?? []) addClade(growing, child, centre);
	return {
		order: Int32Array.from(growing.order),
		blocks: Int32Array.from(growing.blocks),
		meeting: Int32Array.from(growing.meeting),
		walked: Int32Array.from(growing.walked),
		leftAt: Int32Array.from(leftAt),
		centre
	};
}

function sizeOf({ tipFrom, tipTo }: TreeShape, node: number): number {
	return (tipTo[node] ?? 0) - (tipFrom[node] ?? 0);
}

/** The child that holds more than half of all tips, if there is one. */
function largeChild(shape: TreeShape, node: number): number | undefined {
	return shape.children[node]?.find((child) => 2 * sizeOf(shape, child) > shape.tips.length);
}

type Block = {
	readonly rows: readonly [number, number];
	readonly columns: readonly [number, number];
	readonly meeting: number;
	readonly walked: number;
};

function addBlock({ blocks, meeting, walked }: Growing, block: Block): void {
	const [short, long] = [block.rows, block.columns].sort((a, b) => a[1] - a[0] - (b[1] - b[0]));
	if (short === undefined || long === undefined || short[0] === short[1]) return;
	blocks.push(...short, ...long);
	meeting.push(block.meeting);
	walked.push(block.walked);
}

/** The tips of a clade, and the blocks of the nodes inside it. */
function addClade(growing: Growing, clade: number, walked: number): void {
	const { shape, slotOf, order } = growing;
	const first = shape.tipFrom[clade] ?? 0;
	const shift = order.length - first;
	for (let position = first; position < (shape.tipTo[clade] ?? 0); position++) order.push(position);
	const waiting = [clade];
	for (let node = waiting.pop(); node !== undefined; node = waiting.pop()) {
		const below = shape.children[node] ?? [];
		waiting.push(...below);
		const from = shift + (shape.tipFrom[node] ?? 0);
		for (const child of below.slice(1)) {
			const middle = shift + (shape.tipFrom[child] ?? 0);
			const to = middle + sizeOf(shape, child);
			addBlock(growing, { rows: [from, middle], columns: [middle, to], meeting: slotOf.get(node) ?? 0, walked });
		}
	}
}

/** Weights of one form: `constant` times the total, `own` times row sums, `blocks` times the sums of the blocks. */
export type FormWeights = { readonly constant: number; readonly own: Float64Array; readonly blocks: Float64Array };

/** @param f - shape (slots,); what a pair that meets at the node is multiplied by */
export function formWeights({ meeting, walked, leftAt, centre }: BlockFormLayout, f: Float64Array): FormWeights {
	const at = (slot: number | undefined) => f[slot ?? 0] ?? 0;
	const constant = at(centre);
	return {
		constant,
		own: Float64Array.from(leftAt, (slot) => at(slot) - constant),
		blocks: Float64Array.from(meeting, (slot, block) => at(slot) - 2 * at(walked[block]) + constant)
	};
}
