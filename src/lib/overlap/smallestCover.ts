/** Undirected, no loops; only vertices that have neighbours. */
export type Graph = Map<number, Set<number>>;
export type Cover = { readonly vertices: readonly number[]; readonly exact: boolean };

/**
 * A smallest set of vertices that touches every edge. Consumes the graph. Each connected part is solved on its own:
 * exactly up to `exactLimit` vertices after vertices of degree 1 are settled, else greedily by degree.
 */
export function smallestCover(graph: Graph, exactLimit: number): Cover {
	const vertices = settleLeaves(graph);
	let exact = true;
	for (const part of connectedParts(graph)) {
		const greedy = greedyCover(copyOf(part));
		const isSmall = part.size <= exactLimit;
		exact &&= isSmall;
		vertices.push(...(isSmall ? (improve(part, greedy.length) ?? greedy) : greedy));
	}
	return { vertices, exact };
}

/**
 * A cover of fewer than `bound` vertices, the smallest there is; undefined when there is none. Branches on the vertex with
 * most neighbours: it is in the cover, or all its neighbours are. A matching bounds from below, as each of its edges needs
 * a vertex of its own.
 */
function improve(graph: Graph, bound: number): number[] | undefined {
	const taken = settleLeaves(graph);
	if (graph.size === 0) return taken.length < bound ? taken : undefined;
	if (taken.length + matchingSize(graph) >= bound) return undefined;
	const top = busiest(graph);
	const neighbours = [...(graph.get(top) ?? [])];

	const without = copyOf(graph);
	take(without, top);
	const first = improve(without, bound - taken.length - 1);
	const best = first === undefined ? bound : taken.length + 1 + first.length;
	for (const neighbour of neighbours) take(graph, neighbour);
	const second = improve(graph, best - taken.length - neighbours.length);
	if (second !== undefined) return [...taken, ...neighbours, ...second];
	return first === undefined ? undefined : [...taken, top, ...first];
}

/** A vertex with one neighbour: taking the neighbour is never worse. Removes such pairs from the graph until none is left. */
function settleLeaves(graph: Graph): number[] {
	const taken: number[] = [];
	const waiting = [...graph.keys()].sort((a, b) => a - b);
	for (let vertex = waiting.pop(); vertex !== undefined; vertex = waiting.pop()) {
		const neighbours = graph.get(vertex);
		if (neighbours?.size !== 1) continue;
		for (const neighbour of neighbours) {
			waiting.push(...(graph.get(neighbour) ?? []));
			take(graph, neighbour);
			taken.push(neighbour);
		}
	}
	return taken;
}

function greedyCover(graph: Graph): number[] {
	const taken: number[] = [];
	while (graph.size > 0) {
		const top = busiest(graph);
		take(graph, top);
		taken.push(top, ...settleLeaves(graph));
	}
	return taken;
}

/** The vertex with most neighbours, the first among equals. */
function busiest(graph: Graph): number {
	let top = -1;
	let most = 0;
	for (const [vertex, neighbours] of graph) {
		if (neighbours.size < most || (neighbours.size === most && vertex > top)) continue;
		top = vertex;
		most = neighbours.size;
	}
	return top;
}

/** Removes a vertex with its edges, and the vertices that are left without any. */
function take(graph: Graph, vertex: number): void {
	for (const neighbour of graph.get(vertex) ?? []) {
		const others = graph.get(neighbour);
		others?.delete(vertex);
		if (others?.size === 0) graph.delete(neighbour);
	}
	graph.delete(vertex);
}

function matchingSize(graph: Graph): number {
	const used = new Set<number>();
	let size = 0;
	for (const [vertex, neighbours] of graph) {
		if (used.has(vertex)) continue;
		const partner = [...neighbours].find((neighbour) => !used.has(neighbour));
		if (partner === undefined) continue;
		used.add(vertex).add(partner);
		size += 1;
	}
	return size;
}

function connectedParts(graph: Graph): Graph[] {
	const parts: Graph[] = [];
	const seen = new Set<number>();
	for (const start of graph.keys()) {
		if (seen.has(start)) continue;
		const part: Graph = new Map();
		const waiting = [start];
		seen.add(start);
		for (let vertex = waiting.pop(); vertex !== undefined; vertex = waiting.pop()) {
			const neighbours = graph.get(vertex) ?? new Set<number>();
			part.set(vertex, neighbours);
			for (const neighbour of neighbours) {
				if (seen.has(neighbour)) continue;
				seen.add(neighbour);
				waiting.push(neighbour);
			}
		}
		parts.push(part);
	}
	return parts;
}

function copyOf(graph: Graph): Graph {
	return new Map([...graph].map(([vertex, neighbours]) => [vertex, new Set(neighbours)]));
}
