type Ages = { readonly parent: readonly number[]; readonly age: readonly number[] };

/** Room of the drawing, in its own units. */
export const TINY_TREE = { width: 240, height: 56 } as const;

/**
 * A tree as one path for a thumbnail: present at the left, root at the right, tips in preorder from top to bottom.
 * One pass from the last node to the root, so its depth does not matter.
 *
 * @param tree - preorder; the parent of the root is -1
 */
export function tinyTree({ parent, age }: Ages): string {
	const isInner = parent.map(() => false);
	for (const above of parent) if (above >= 0) isInner[above] = true;
	const tipCount = isInner.filter((inner) => !inner).length;
	const rootAge = Math.max(...age.slice(0, 1), 0) || 1;
	const step = TINY_TREE.height / Math.max(1, tipCount);
	const x = age.map((value) => round((value / rootAge) * TINY_TREE.width));
	const low: number[] = [];
	const high: number[] = [];
	const paths: string[] = [];
	let row = tipCount;
	for (let node = parent.length - 1; node >= 0; node--) {
		if (!isInner[node]) low[node] = high[node] = --row * step + step / 2;
		const y = round(((low[node] ?? 0) + (high[node] ?? 0)) / 2);
		if (isInner[node]) paths.push(`M${x[node]} ${round(low[node] ?? 0)}V${round(high[node] ?? 0)}`);
		const above = parent[node] ?? -1;
		if (above < 0) continue;
		paths.push(`M${x[node]} ${y}H${x[above]}`);
		low[above] = Math.min(low[above] ?? y, y);
		high[above] = Math.max(high[above] ?? y, y);
	}
	return paths.join('');
}

const round = (value: number) => Math.round(value * 10) / 10;
