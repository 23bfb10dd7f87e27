import { describe, expect, it } from 'vitest';
import { parseNewick } from '#lib/phylogeny/newick.ts';
import { nodeAges, rootAge } from '#lib/phylogeny/nodeAges.ts';
import { tipLabels } from '#lib/phylogeny/tree.ts';
import { MOST_SIMULATED, simulatedSpecies } from './simulatedSpecies.ts';

/** A ladder of species s0, s1, …, the last one oldest; overlap of i and j tells both. */
function ladder(count: number) {
	let text = 's0:1';
	for (let i = 1; i < count; i++) text = `(${text},s${i}:${i}):1`;
	const tree = parseNewick(`${text.slice(0, -2)};`).trees[0]?.tree;
	if (tree === undefined) throw new Error('The ladder was not read.');
	const overlap = Float64Array.from({ length: count * count }, (_, cell) => (Math.floor(cell / count) + (cell % count)) / 1000);
	return { tree, ages: nodeAges(tree), species: tipLabels(tree), overlap };
}

describe('simulatedSpecies', () => {
	it('keeps all species of a tree that is not large', () => {
		const small = ladder(12);
		expect(simulatedSpecies(small)).toEqual(small);
	});

	it('keeps species at even steps of a large tree, with their overlaps and ages', () => {
		const whole = ladder(300);
		const { tree, ages, species, overlap } = simulatedSpecies(whole);
		expect(species).toHaveLength(MOST_SIMULATED);
		expect(tipLabels(tree)).toEqual(species);
		// By hand: 120 of 300, floor(i · 2.5): 0, 2, 5, 7, 10, …
		const places = species.map((name) => whole.species.indexOf(name));
		expect(places.slice(0, 5)).toEqual([0, 2, 5, 7, 10]);
		expect(overlap[3 * MOST_SIMULATED + 4]).toBe(whole.overlap[7 * 300 + 10]);
		expect(ages[0]).toBeCloseTo(rootAge(tree), 9);
	});
});
