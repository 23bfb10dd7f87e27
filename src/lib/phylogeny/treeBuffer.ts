import type { Tree } from './tree.ts';

const NO_ANNOTATIONS: Tree['annotations'] = new Map();

/** Arrays that grow while a tree is read and are used again for the next one. */
export class TreeBuffer {
	count = 0;
	parent = new Int32Array(256);
	childCount = new Int32Array(256);
	/** offset in the text where the node begins */
	start = new Int32Array(256);
	length = new Float64Array(256);
	/** used again too: what stands past `count` is of an earlier tree */
	readonly label: string[] = [];
	readonly labelRaw: string[] = [];
	private annotations = new Map<number, Record<string, string>>();

	clear(): void {
		this.count = 0;
		if (this.annotations.size > 0) this.annotations = new Map();
	}

	/** Adds a node without label or length below `parent` (-1 for the root) and returns its index. */
	add(parent: number, start: number): number {
		const node = this.count;
		if (node === this.parent.length) this.grow();
		this.count = node + 1;
		this.parent[node] = parent;
		this.childCount[node] = 0;
		this.start[node] = start;
		this.length[node] = NaN;
		this.label[node] = this.labelRaw[node] = '';
		if (parent >= 0) this.childCount[parent] = (this.childCount[parent] ?? 0) + 1;
		return node;
	}

	annotate(node: number, entries: readonly [string, string][]): void {
		const known = this.annotations.get(node) ?? {};
		this.annotations.set(node, Object.fromEntries([...Object.entries(known), ...entries]));
	}

	/** A tree of its own: later use of the buffer leaves it alone, and each array has its own memory, ready to be transferred. */
	toTree(): Tree {
		const { count } = this;
		return {
			parent: this.parent.slice(0, count),
			length: this.length.slice(0, count),
			childCount: this.childCount.slice(0, count),
			label: this.label.slice(0, count),
			labelRaw: this.labelRaw.slice(0, count),
			annotations: this.annotations.size === 0 ? NO_ANNOTATIONS : this.annotations
		};
	}

	private grow(): void {
		this.parent = doubled(this.parent, Int32Array);
		this.childCount = doubled(this.childCount, Int32Array);
		this.start = doubled(this.start, Int32Array);
		this.length = doubled(this.length, Float64Array);
	}
}

function doubled<T extends Int32Array | Float64Array>(array: T, kind: new (length: number) => T): T {
	const larger = new kind(array.length * 2);
	larger.set(array);
	return larger;
}
