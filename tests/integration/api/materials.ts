import { z } from 'zod';
import {
	analysisAnswerSchema,
	analysisStartedSchema,
	overlapRunCreatedSchema,
	studySchema,
	treeSetCreatedSchema
} from '#lib/contracts/answers.ts';
import type { Client } from './client.ts';

/**
 * Four species worked out by hand: (((A:1,B:1):1,C:2):2,D:4) and Schoener's D of five cells. Slope −31/265, r −0.952157431093;
 * 2 of the 24 relabellings are as extreme, 2 of 6 within the deepest split.
 */
export const TREE = "(((Aa_one:1,Ab_two:1):1,'Ac three':2):2,Ad_four:4);";
export const SPECIES = ['Aa one', 'Ab two', 'Ac three', 'Ad four'];
export const MATRIX = {
	species: SPECIES,
	values: [
		[1, 0.8, 0.7, 0.4],
		[0.8, 1, 0.6, 0.4],
		[0.7, 0.6, 1, 0.5],
		[0.4, 0.4, 0.5, 1]
	]
};
export const CSV = [
	'species,Aa one,Ab two,Ac three,Ad four',
	...MATRIX.values.map((row, i) => [SPECIES[i], ...row].join(','))
].join('\n');

export async function makeStudy(client: Client, lab?: string): Promise<string> {
	const study = await client.post('/studies', { title: 'Lantern frogs', ...(lab === undefined ? {} : { lab }) }, studySchema);
	return study.id;
}

type Given = { readonly tree?: string; readonly csv?: string; readonly confirm?: object };
export type Materials = { readonly study: string; readonly treeSet: string; readonly overlapRun: string };

export async function bringMaterials(
	client: Client,
	study: string,
	{ tree = TREE, csv = CSV, confirm }: Given = {}
): Promise<Materials> {
	const confirmed = confirm === undefined ? {} : { confirm };
	const trees = await client.post(
		`/studies/${study}/tree-sets`,
		{ label: 'Tree', text: tree, ...confirmed },
		treeSetCreatedSchema
	);
	const run = await client.post(
		`/studies/${study}/overlap-runs`,
		{ label: 'Overlap', measure: 'schoener-d', csv, ...confirmed },
		overlapRunCreatedSchema
	);
	return { study, treeSet: trees.id, overlapRun: run.id };
}

export type Ran = Materials & { readonly analysis: string };

/** Runs a plan to its end. */
export async function runAnalysis(client: Client, materials: Materials, plan: object = {}): Promise<Ran> {
	const { study, treeSet, overlapRun } = materials;
	const { id } = await client.post(`/studies/${study}/analyses`, { treeSet, overlapRun, ...plan }, analysisStartedSchema);
	await untilOver(client, id);
	return { ...materials, analysis: id };
}

/** The stream of events ends when the analysis does, so nobody has to sleep. */
export async function untilOver(client: Client, analysis: string): Promise<string> {
	const response = await client.fetch(`/analyses/${analysis}/events`);
	return response.text();
}

export function finishedAnalysis(client: Client, id: string) {
	return client.get(`/analyses/${id}`, analysisAnswerSchema.required({ result: true }));
}

export const anything = z.unknown();
