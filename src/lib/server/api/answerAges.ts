import { compute } from '#lib/server/jobs/pool.ts';
import type { TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import { ageRows } from './ageRows.ts';
import { answerJson } from './answering.ts';
import { csvLine, csvResponse } from './csv.ts';
import { readStructure, readTree } from './readStructure.ts';
import { Refusal } from './refusal.ts';
import { squareRows } from './squareRows.ts';

const JSON_LIMIT_TIPS = 2000;

type Options = { readonly tree: number; readonly species: readonly string[] | undefined; readonly asCsv: boolean };

/** MRCA ages of every pair of tips, or of the species asked for: a matrix as JSON, or a table that streams. */
export async function answerAges(treeSet: TreeSet, { tree, species, asCsv }: Options): Promise<Response> {
	if (!asCsv) return agesAsJson(treeSet, tree, species);
	const structure = await readStructure(treeSet, tree);
	const chosen = chosenTips(structure.tipNames, species);
	return csvResponse('mrca-ages.csv', ageLines(structure, chosen));
}

async function agesAsJson(treeSet: TreeSet, tree: number, species: readonly string[] | undefined): Promise<Response> {
	const count = species?.length ?? treeSet.tipCount;
	if (count > JSON_LIMIT_TIPS) {
		const way = 'Ask for fewer with `species`, or for a table: Accept: text/csv.';
		throw new Refusal(422, 'too-many-tips', `Expected at most 2,000 tips as JSON; there are ${count}. ${way}`);
	}
	const { text, index } = await readTree(treeSet, tree);
	const asked = species === undefined ? {} : { species };
	const { spreadConfirmed } = treeSet;
	const ages = await compute('mrcaAges', { text, tree: index, spreadConfirmed, ...asked });
	return answerJson({ species: ages.species, values: squareRows(ages.values, ages.species.length) });
}

type Tips = { readonly names: readonly string[]; readonly chosen: readonly number[] };

/** @throws {Refusal} 422 `unknown-species`, naming every one */
function chosenTips(names: readonly string[], species: readonly string[] | undefined): Tips {
	if (species === undefined) return { names, chosen: names.map((_, index) => index) };
	const place = new Map(names.map((name, index) => [name, index]));
	const unknown = species.filter((name) => !place.has(name));
	if (unknown.length > 0) {
		throw new Refusal(422, 'unknown-species', `Expected names of tips in \`species\`; not in this tree: ${unknown.join(', ')}.`);
	}
	return { names, chosen: species.map((name) => place.get(name) ?? 0) };
}

/** The square with names in the first row and column, made row by row. */
function* ageLines(structure: Parameters<typeof ageRows>[0], { names, chosen }: Tips): Generator<string> {
	const shown = chosen.map((tip) => names[tip] ?? '');
	yield csvLine(['species', ...shown]);
	const rowOf = new Map(chosen.map((tip, row) => [tip, row]));
	const lines: string[] = [];
	const isInOrder = chosen.every((tip, row) => row === 0 || tip > (chosen[row - 1] ?? 0));
	let tip = 0;
	for (const ages of ageRows(structure)) {
		const row = rowOf.get(tip);
		if (row !== undefined) {
			const line = csvLine([shown[row] ?? '', ...chosen.map((other) => ages[other] ?? Number.NaN)]);
			if (isInOrder) yield line;
			else lines[row] = line;
		}
		tip += 1;
	}
	yield* lines;
}
