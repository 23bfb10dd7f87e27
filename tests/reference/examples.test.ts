import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { exampleFiles } from '../../src/commands/examples/exampleFiles.ts';
import { randomNumbers } from '../../src/commands/examples/randomNumbers.ts';
import { mrcaAges } from '#lib/phylogeny/mrcaAges.ts';
import { nodeAges, rootAge } from '#lib/phylogeny/nodeAges.ts';
import { readTrees } from '#lib/phylogeny/readTrees.ts';
import { tipLabels, type Tree } from '#lib/phylogeny/tree.ts';
import { ultrametricSpread } from '#lib/phylogeny/ultrametric.ts';

const FOLDER = resolve('static/examples');
const STUDIES = [
	{ name: 'lanternfrogs', tips: 26, rootAgeMa: 18.4 },
	{ name: 'moss-beetles', tips: 18, rootAgeMa: 12.6 }
] as const;

const textOf = (path: string): string => readFileSync(join(FOLDER, path), 'utf8');
const summaryTree = (study: string): Tree => onlyTree(textOf(`${study}/summary-tree.nwk`));

function onlyTree(text: string): Tree {
	const [first, ...others] = readTrees(text).trees;
	if (first === undefined || others.length > 0) throw new Error('Expected exactly one tree.');
	return first.tree;
}

type Square = { readonly species: readonly string[]; readonly rows: readonly (readonly number[])[] };

function readSquare(path: string): Square {
	const [head = '', ...lines] = textOf(path).trimEnd().split('\n');
	return { species: head.split(',').slice(1), rows: lines.map((line) => line.split(',').slice(1).map(Number)) };
}

/** Values of all pairs of the named species, rows above columns. */
function pairsOf({ species, rows }: Square, names: readonly string[]): number[] {
	const positions = names.map((name) => species.indexOf(name));
	return positions.flatMap((row, index) => positions.slice(0, index).map((column) => rows[row]?.[column] ?? Number.NaN));
}

/** Ages of all pairs of tips in the order of the tree, to go with `pairsOf(…, tipLabels(tree))`. */
function pairAges(tree: Tree): number[] {
	const count = tipLabels(tree).length;
	const ages = mrcaAges(tree, nodeAges(tree));
	return Array.from({ length: count }, (_, row) => [...ages.subarray(row * count, row * count + row)]).flat();
}

function correlation(x: readonly number[], y: readonly number[]): number {
	const [meanX, meanY] = [x, y].map((values) => values.reduce((sum, value) => sum + value, 0) / values.length);
	const products = (a: readonly number[], b: readonly number[], meanA = 0, meanB = 0): number =>
		a.reduce((sum, value, index) => sum + (value - meanA) * ((b[index] ?? 0) - meanB), 0);
	return products(x, y, meanX, meanY) / Math.sqrt(products(x, x, meanX, meanX) * products(y, y, meanY, meanY));
}

function filesUnder(folder: string): string[] {
	return readdirSync(folder, { recursive: true, encoding: 'utf8' })
		.filter((path) => statSync(join(folder, path)).isFile())
		.map((path) => path.replaceAll('\\', '/'))
		.sort();
}

describe('exampleFiles', () => {
	const made = exampleFiles();

	it('makes the very bytes of static/examples', () => {
		for (const { path, text } of made) {
			expect(text === textOf(path), `${path} differs from what is made; run npm run examples and look at the change`).toBe(true);
		}
	});

	it('makes every file that lies there', () => {
		expect(filesUnder(FOLDER)).toEqual(made.map(({ path }) => path).sort());
	});

	it('stays under the 6 MB a repository should carry for examples', () => {
		expect(made.reduce((sum, { text }) => sum + Buffer.byteLength(text), 0)).toBeLessThan(6e6);
	});
});

describe.each(STUDIES)('the example tree of $name', ({ name, tips, rootAgeMa }) => {
	const tree = summaryTree(name);

	it('has its species once each and its root at the stated age', () => {
		expect(new Set(tipLabels(tree)).size).toBe(tips);
		expect(tree.childCount.every((count) => count === 0 || count === 2)).toBe(true);
		expect(rootAge(tree)).toBeCloseTo(rootAgeMa, 9); // lengths are differences of ages rounded to 6 decimals
	});

	it('is ultrametric to rounding', () => {
		expect(ultrametricSpread(tree)).toBeLessThan(1e-12);
	});

	it('gives neither side of the root fewer than four species, and the root a fifth to just over a half of the pairs', () => {
		const labels = tipLabels(tree);
		const rootPairs = pairAges(tree).filter((age) => age > rootAgeMa - 1e-9).length;
		expect(rootPairs / ((labels.length * (labels.length - 1)) / 2)).toBeGreaterThan(0.2);
		expect(rootPairs / ((labels.length * (labels.length - 1)) / 2)).toBeLessThan(0.51);
		expect(rootPairs).toBeGreaterThanOrEqual(4 * (tips - 4)); // k (n - k) grows from k = 4 to the middle
	});
});

describe('the posterior trees of the lanternfrogs', () => {
	const { format, trees } = readTrees(textOf('lanternfrogs/posterior-trees.nex'));
	const species = tipLabels(summaryTree('lanternfrogs')).sort();

	it('are 200 dated trees of the same 26 species', () => {
		expect(format).toBe('nexus');
		expect(trees).toHaveLength(200);
		for (const { tree } of trees) {
			expect(tipLabels(tree).sort()).toEqual(species);
			expect(ultrametricSpread(tree)).toBeLessThan(1e-12);
			expect(tree.length.every((length, node) => node === 0 || length > 0)).toBe(true);
		}
	});

	it('have their roots around 18.4 Ma, 95 % of them within about 16.5 to 20.5', () => {
		const roots = trees.map(({ tree }) => rootAge(tree)).sort((a, b) => a - b);
		// By plan: log-normal with median 18.4 and 2.5 % beyond either end. Of 200 draws 10 ± 3.1 lie outside; 3.2 s.d. allowed.
		const outside = roots.filter((age) => age < 16.5 || age > 20.5).length;
		expect(outside).toBeGreaterThan(0);
		expect(outside).toBeLessThan(20);
		expect(roots[100]).toBeCloseTo(18.4, 0);
	});

	it('agree on the shape except for a few', () => {
		const shapes = trees.map(({ tree }) => cladesOf(tree));
		const summary = cladesOf(summaryTree('lanternfrogs'));
		const different = shapes.filter((shape) => shape !== summary).length;
		// By plan 8 % of 200, that is 16 ± 3.8; 3.2 s.d. allowed.
		expect(different).toBeGreaterThan(3);
		expect(different).toBeLessThan(29);
	});
});

/** The clades of a tree as one text: two trees have the same shape when the texts are equal. */
function cladesOf(tree: Tree): string {
	const members = Array.from(tree.parent, (): string[] => []);
	for (let node = tree.parent.length - 1; node >= 0; node--) {
		if (tree.childCount[node] === 0) members[node]?.push(tree.label[node] ?? '');
		members[tree.parent[node] ?? -1]?.push(...(members[node] ?? []));
	}
	return members
		.map((names) => names.sort().join('+'))
		.sort()
		.join(' ');
}

describe.each(STUDIES)('the example matrices of $name', ({ name }) => {
	const d = readSquare(`${name}/overlap-d.csv`);
	const i = readSquare(`${name}/overlap-i.csv`);

	it('hold the species of the tree, are symmetric and have 1 on the diagonal', () => {
		for (const { species, rows } of [d, i]) {
			expect([...species].sort()).toEqual(tipLabels(summaryTree(name)).sort());
			rows.forEach((row, a) => row.forEach((value, b) => expect(value).toBe(a === b ? 1 : rows[b]?.[a])));
		}
	});

	// Property: the bounds of Le Cam, D <= I <= sqrt(D (2 - D)); half a unit of the sixth decimal on either side.
	it('keep D <= I <= sqrt(D (2 - D))', () => {
		const [ds, is] = [pairsOf(d, d.species), pairsOf(i, d.species)];
		for (const [pair, value] of ds.entries()) {
			expect(is[pair]).toBeGreaterThanOrEqual(value - 1e-6);
			expect(is[pair]).toBeLessThanOrEqual(Math.sqrt(value * (2 - value)) + 1e-5);
		}
	});

	it('have a mean D between 0.2 and 0.5', () => {
		const values = pairsOf(d, d.species);
		const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
		expect(mean).toBeGreaterThan(0.2);
		expect(mean).toBeLessThan(0.5);
	});
});

describe('the suitability maps of the lanternfrogs', () => {
	const readGrid = (path: string): { header: string[]; values: number[] } => {
		const lines = textOf(path).trimEnd().split('\n');
		return { header: lines.slice(0, 6), values: lines.slice(6).flatMap((line) => line.split(' ').map(Number)) };
	};
	const d = readSquare('lanternfrogs/overlap-d.csv');
	const mapOf = (species: string): { header: string[]; values: number[] } =>
		readGrid(`lanternfrogs/maps/${species.replaceAll(' ', '_')}.asc`);
	const layer = readGrid('merrow-range/temperature.asc');

	it('share one frame and one coast with the climates, lie within 0 to 1 and are not empty', () => {
		for (const species of d.species) {
			const { header, values } = mapOf(species);
			expect(header).toEqual(layer.header);
			expect(values).toHaveLength(160 * 120);
			expect(values.every((value, cell) => (value === -9999) === (layer.values[cell] === -9999))).toBe(true);
			const land = values.filter((value) => value !== -9999);
			expect(land.every((value) => value >= 0 && value <= 1)).toBe(true);
			expect(Math.max(...land)).toBeGreaterThan(0.5);
		}
	});

	// Worked out again from the files by the other form of D, 1 - ½ sum |p - q|: row r of 120 has its middle at 41° - (r + ½) × 2.5′.
	it('give the matrix of D back', () => {
		const shares = d.species.map((species) => {
			const weighted = mapOf(species).values.map((value, cell) => {
				const latitude = 41 - ((Math.floor(cell / 160) + 0.5) * 2.5) / 60;
				return value === -9999 ? 0 : value * Math.cos((latitude * Math.PI) / 180);
			});
			const total = weighted.reduce((sum, value) => sum + value, 0);
			return weighted.map((value) => value / total);
		});
		shares.slice(1).forEach((p, index) => {
			const q = shares[index] ?? [];
			const difference = p.reduce((sum, share, cell) => sum + Math.abs(share - (q[cell] ?? 0)), 0);
			expect(d.rows[index + 1]?.[index]).toBeCloseTo(1 - difference / 2, 5);
		});
	});

	it('are sampled by 30 to 90 records a species, each with the climate of the cell it lies in', () => {
		const rainfall = readGrid('merrow-range/rainfall.asc');
		const records = textOf('lanternfrogs/records.csv')
			.trimEnd()
			.split('\n')
			.slice(1)
			.map((line) => line.split(','));
		for (const [, , , latitude, longitude, , temperature, rain] of records) {
			const row = Math.floor((41 - Number(latitude)) * 24); // 24 cells of 2.5′ a degree
			const cell = row * 160 + Math.floor((Number(longitude) + 150) * 24);
			expect(layer.values[cell]).toBe(Number(temperature));
			expect(rainfall.values[cell]).toBe(Number(rain));
		}
		for (const species of d.species) {
			const count = records.filter((record) => record[2] === species).length;
			expect(count).toBeGreaterThanOrEqual(30);
			expect(count).toBeLessThanOrEqual(90);
		}
	});
});

/** Share of shuffles, the observed order among them, whose sum of age × overlap is no larger (lower tail) and no smaller. */
function shuffleTails(study: string, blocks: (tips: number) => number[][]): { pLess: number; pGreater: number } {
	const tree = summaryTree(study);
	const labels = tipLabels(tree);
	const square = readSquare(`${study}/overlap-d.csv`);
	const ages = pairAges(tree);
	const sumFor = (order: readonly string[]): number =>
		pairsOf(square, order).reduce((sum, value, pair) => sum + value * (ages[pair] ?? 0), 0);
	const random = randomNumbers(1, 'shuffles');
	const observed = sumFor(labels);
	const counts = { less: 1, greater: 1 };
	for (let shuffle = 0; shuffle < SHUFFLES; shuffle++) {
		const order = [...labels];
		for (const block of blocks(labels.length)) dealWithin(block, order, random.index);
		const sum = sumFor(order);
		if (sum <= observed + 1e-9) counts.less += 1;
		if (sum >= observed - 1e-9) counts.greater += 1;
	}
	return { pLess: counts.less / (SHUFFLES + 1), pGreater: counts.greater / (SHUFFLES + 1) };
}

const SHUFFLES = 1999;

function dealWithin(block: readonly number[], order: string[], index: (count: number) => number): void {
	for (let last = block.length - 1; last > 0; last--) {
		const [here, there] = [block[last] ?? 0, block[index(last + 1)] ?? 0];
		[order[here], order[there]] = [order[there] ?? '', order[here] ?? ''];
	}
}

const everybody = (tips: number): number[][] => [Array.from({ length: tips }, (_, tip) => tip)];
/** Tips come in the order of the tree, the smaller side of the root first. */
const sides =
	(smaller: number) =>
	(tips: number): number[][] => [[...Array(smaller).keys()], [...Array(tips - smaller).keys()].map((tip) => tip + smaller)];

function smallerSide(study: string): number {
	const tree = summaryTree(study);
	const second = tree.parent.lastIndexOf(0);
	return tipLabels(tree).length - tree.childCount.subarray(second).filter((count) => count === 0).length;
}

describe('what the examples show', () => {
	it('lanternfrogs: overlap falls with age, and more weakly so within the deepest split', () => {
		const free = shuffleTails('lanternfrogs', everybody);
		const within = shuffleTails('lanternfrogs', sides(smallerSide('lanternfrogs')));
		expect(free.pLess).toBeLessThan(0.015);
		expect(within.pLess).toBeLessThan(0.05);
		expect(within.pLess).toBeGreaterThan(2 * free.pLess);
	});

	it('moss beetles: nothing, in either tail, freely or within the deepest split', () => {
		const within = sides(smallerSide('moss-beetles'));
		for (const blocks of [everybody, within]) {
			const { pLess, pGreater } = shuffleTails('moss-beetles', blocks);
			expect(pLess).toBeGreaterThan(0.2);
			expect(pGreater).toBeGreaterThan(0.2);
		}
	});
});

type Truth = {
	readonly species: readonly { readonly species: string; readonly centre: { temperature: number; rainfall: number } }[];
};

describe('truth.json', () => {
	// Property of Brownian motion: the expected squared distance of two centres is proportional to the age of their common ancestor.
	it('lanternfrogs: squared distance between centres rises with age, and with the stated rate to the order of magnitude', () => {
		const tree = summaryTree('lanternfrogs');
		const truth: Truth & { niches: { variancePerMyr: number } } = JSON.parse(textOf('lanternfrogs/truth.json'));
		const centres = new Map(truth.species.map(({ species, centre }) => [species, centre]));
		const labels = tipLabels(tree);
		const squared = labels.flatMap((a, index) =>
			labels.slice(0, index).map((b) => {
				const [first, second] = [centres.get(a), centres.get(b)];
				if (first === undefined || second === undefined) throw new Error(`No truth for ${a} or ${b}.`);
				return (first.temperature - second.temperature) ** 2 + (first.rainfall - second.rainfall) ** 2;
			})
		);
		const ages = pairAges(tree);
		expect(correlation(squared, ages)).toBeGreaterThan(0.1);
		// Two climates, each with variance 2 v t between two tips: sum of squares over sum of ages estimates 4 v.
		const rate = squared.reduce((sum, value) => sum + value, 0) / ages.reduce((sum, age) => sum + age, 0) / 4;
		expect(rate / truth.niches.variancePerMyr).toBeGreaterThan(1 / 3);
		expect(rate / truth.niches.variancePerMyr).toBeLessThan(3);
	});

	it.each(STUDIES)('names the seed and says that the seed of $name was chosen', ({ name }) => {
		const truth: { seed: number; seedNote: string; invented: boolean } = JSON.parse(textOf(`${name}/truth.json`));
		expect(truth.seed).toBeGreaterThan(0);
		expect(truth.invented).toBe(true);
		expect(truth.seedNote).toMatch(/^Chosen so that the example shows/);
	});
});
