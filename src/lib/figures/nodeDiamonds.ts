import { ALL_DIAMONDS_UP_TO, LARGEST_DIAMONDS } from '#lib/contracts/drawnPlate.ts';
import { markHeight, type OverlapAxis } from './overlapAxis.ts';
import type { PlateModel, PlateNode } from './plateModel.ts';

export type Diamond = {
	readonly node: number;
	readonly x: number;
	readonly y: number;
	/** half the diagonal; drawing units */
	readonly reach: number;
	/** a node with one pair is its own mean and is drawn filled */
	readonly filled: boolean;
};

/** Half diagonals for few, some and many pairs. */
const REACHES = [3.6, 4.8, 6] as const;
const SOME = 4;
const MANY = 25;
/** Places closer than this are one age as far as the eye can tell; drawing units. */
const SAME_PLACE = 0.5;

export function diamondReach(pairCount: number): number {
	if (pairCount >= MANY) return REACHES[2];
	return pairCount >= SOME ? REACHES[1] : REACHES[0];
}

/** The nodes that get a diamond: all of them, or the 20 with most pairs where there are more than 60. */
export function nodesWithDiamond(nodes: readonly PlateNode[]): PlateNode[] {
	if (nodes.length <= ALL_DIAMONDS_UP_TO) return [...nodes];
	return [...nodes].sort((a, b) => b.pairCount - a.pairCount || a.node - b.node).slice(0, LARGEST_DIAMONDS);
}

/**
 * The mean across every node at its age. Diamonds of equal age that would cover one another dodge sideways by turns;
 * others stay, because moving them would misstate an age.
 */
export function nodeDiamonds(model: PlateModel, xOfAge: (age: number) => number, axis: OverlapAxis): Diamond[] {
	const diamonds = nodesWithDiamond(model.nodes).map((node): Diamond => {
		const y = markHeight(axis, node.mean);
		return { node: node.node, x: xOfAge(node.age), y, reach: diamondReach(node.pairCount), filled: node.pairCount === 1 };
	});
	diamonds.sort((a, b) => a.x - b.x || a.y - b.y || a.node - b.node);
	const columns: Diamond[][] = [];
	for (const diamond of diamonds) {
		const last = columns.at(-1);
		if (last && diamond.x - (last[0]?.x ?? -Infinity) < SAME_PLACE) last.push(diamond);
		else columns.push([diamond]);
	}
	return columns.flatMap(dodged);
}

function dodged(column: readonly Diamond[]): Diamond[] {
	const placed: Diamond[] = [];
	for (const diamond of column) {
		let x = diamond.x;
		for (let turn = 1; placed.some((other) => covers(other, { ...diamond, x })); turn++) {
			x = diamond.x + Math.ceil(turn / 2) * (turn % 2 === 1 ? 1 : -1) * diamond.reach;
		}
		placed.push({ ...diamond, x });
	}
	return placed;
}

/** Two diamonds overlap when the sum of their offsets is under the sum of their reaches. */
function covers(a: Diamond, b: Diamond): boolean {
	return Math.abs(a.x - b.x) + Math.abs(a.y - b.y) < (a.reach + b.reach) * 0.9;
}
