/** A tree in preorder: `parent[0]` is -1 and every parent comes before its children. Ages count back from the tips. */
export type AgedNodes = { readonly parent: readonly number[]; readonly age: readonly number[] };

/**
 * The MRCA ages of one tip with every tip at a time, in tree order: a whole matrix of 10,000 tips would be 800 MB, and a
 * row is enough for a table that is made while it is sent.
 *
 * @param nodes - one rooted tree in preorder
 * @yields shape (tips,); unit of `age`; 0 at the tip itself
 */
export function* ageRows(nodes: AgedNodes): Generator<Float64Array> {
	const { tipOf, first, end } = tipSpans(nodes);
	for (const [row, tip] of tipOf.entries()) {
		const ages = new Float64Array(tipOf.length);
		let from = row;
		let to = row + 1;
		// Walking rootward, each ancestor adds the tips below it that no younger ancestor had.
		for (let node = nodes.parent[tip] ?? -1; node >= 0; node = nodes.parent[node] ?? -1) {
			const age = nodes.age[node] ?? Number.NaN;
			const start = first[node] ?? 0;
			const stop = end[node] ?? 0;
			ages.fill(age, start, from);
			ages.fill(age, to, stop);
			from = start;
			to = stop;
		}
		yield ages;
	}
}

/** Tips by their place in tree order, and for each node the stretch [first, end) of tips below it. */
function tipSpans({ parent }: AgedNodes): { tipOf: number[]; first: Int32Array; end: Int32Array } {
	const isParent = new Uint8Array(parent.length);
	for (const above of parent) if (above >= 0) isParent[above] = 1;
	const tipOf: number[] = [];
	const first = new Int32Array(parent.length);
	const end = new Int32Array(parent.length);
	for (let node = 0; node < parent.length; node++) {
		first[node] = tipOf.length;
		if (isParent[node] === 0) tipOf.push(node);
		end[node] = tipOf.length;
	}
	// In preorder the last descendant comes last, so its end reaches every ancestor when walked backwards.
	for (let node = parent.length - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		end[above] = Math.max(end[above] ?? 0, end[node] ?? 0);
	}
	return { tipOf, first, end };
}
