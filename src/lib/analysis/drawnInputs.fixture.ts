import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import { drawnOverlap, drawnTree } from '#lib/statistics/exampleTrees.ts';
import { lowerTriangle } from '#lib/statistics/pairValues.ts';
import { randomStream } from '#lib/statistics/randomStream.ts';
import { MICRO_INPUTS } from './microResult.fixture.ts';

/** Materials of so many species with a drawn tree and drawn overlaps, the same in every run. */
export function drawnInputs(count: number): AnalysisInputs {
	const species = Array.from({ length: count }, (_, i) => `s${String(i)}`);
	const overlap = { species, lower: lowerTriangle(drawnOverlap(count, randomStream(3, 0, 8)), count), remarks: [] };
	return { ...MICRO_INPUTS, treeText: drawnText(species), spreadConfirmed: true, overlap };
}

/** A drawn tree as text, its tips named in order. */
function drawnText(species: readonly string[]): string {
	const { parent, ages } = drawnTree(species.length, randomStream(2, 0, 8), { polytomies: true });
	let tip = 0;
	const textOf = (node: number): string => {
		const below = [...parent.keys()].filter((child) => parent[child] === node);
		const name = below.length === 0 ? (species[tip++] ?? '') : `(${below.map(textOf).join(',')})`;
		const above = parent[node] ?? -1;
		return above < 0 ? `${name};` : `${name}:${String((ages[above] ?? 0) - (ages[node] ?? 0))}`;
	};
	return textOf(0);
}
