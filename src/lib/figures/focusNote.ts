import { focusNode, type PlateFocus } from './focus.ts';
import { ageText, grouped, overlapText } from './numberText.ts';
import { nodeOf, pairPlace, type PlateModel } from './plateModel.ts';
import type { AgeUnit } from './plateText.ts';
import { figureNames, spanName } from './speciesNames.ts';

export type FocusNote = { readonly name: string; readonly facts: string };

/** The short note of a focus: what it is called, and age, pairs and overlap in words. */
export function focusNote(model: PlateModel, focus: PlateFocus, unit: AgeUnit): FocusNote {
	const names = figureNames(model.species, true);
	const ageOf = (node: number) => {
		const age = ageText(model.age[node] ?? 0, model.rootAge);
		return unit === 'relative' ? `relative age ${age}` : `${age} ${unit}`;
	};
	if (focus.kind === 'species') return { name: names[focus.row] ?? '', facts: speciesFacts(model, focus.row) };
	const node = focusNode(model, focus);
	if (focus.kind === 'pair') {
		const value = model.overlap[pairPlace(focus.i, focus.j)] ?? Number.NaN;
		const overlap = Number.isNaN(value) ? 'missing' : overlapText(value);
		return {
			name: `${names[focus.i] ?? ''} and ${names[focus.j] ?? ''}`,
			facts: `overlap ${overlap}, common ancestor ${ageOf(node)}`
		};
	}
	const inner = nodeOf(model, node);
	const pairs = inner?.pairCount === 1 ? 'one pair across it,' : `${grouped(inner?.pairCount ?? 0)} pairs across it, mean`;
	const ways = (inner?.sides.length ?? 2) > 2 ? `, parts ${inner?.sides.length} ways` : '';
	const weighted = model.average === 'nested' && inner !== undefined && inner.pairCount > 1 ? ' (weighted by branching)' : '';
	const { from, to } = inner ?? { from: 0, to: 1 };
	return {
		name: spanName(model.species, from, to - 1),
		facts: `${ageOf(node)}${ways}; ${pairs} overlap ${overlapText(inner?.mean ?? 0)}${weighted}`
	};
}

function speciesFacts(model: PlateModel, row: number): string {
	let [sum, count] = [0, 0];
	for (let other = 0; other < model.species.length; other++) {
		const value = other === row ? Number.NaN : (model.overlap[pairPlace(row, other)] ?? Number.NaN);
		if (Number.isNaN(value)) continue;
		sum += value;
		count += 1;
	}
	return count === 0 ? 'no overlap known' : `in ${count} pairs, mean overlap ${overlapText(sum / count)}`;
}
