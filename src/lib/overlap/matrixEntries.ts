import { InputError } from '#lib/remarks/inputError.ts';
import type { Place } from '#lib/remarks/remark.ts';
import { cellPlace, cellText, type CellTable } from './cellTable.ts';
import { SPECIES_LIMIT } from './matrixReading.ts';

/**
 * The cells of a matrix that hold something, in the order of the text: cell k belongs to species `from[k]` and `to[k]`
 * (row and column of a square).
 */
export type EntryPlaces = {
	readonly species: readonly string[];
	readonly from: ArrayLike<number>;
	readonly to: ArrayLike<number>;
	/** where each entry stands in the text; null when the matrix did not come as text */
	readonly source: EntrySource | null;
};
export type EntrySource = { readonly table: CellTable; readonly cells: Int32Array };
export type TextEntries = EntryPlaces & { readonly source: EntrySource };
export type MatrixEntries = EntryPlaces & { readonly value: Float64Array };

export type EntryPlace = { readonly said: string; readonly where: Place };

/** Where cell k stands, for a message and for a machine. */
export function entryPlace(entries: EntryPlaces, k: number): EntryPlace {
	const name = entries.species[entries.from[k] ?? -1] ?? '';
	const otherName = entries.species[entries.to[k] ?? -1] ?? '';
	if (entries.source === null) return { said: `Row “${name}”, column “${otherName}”`, where: { name, otherName } };
	const { line, column } = cellPlace(entries.source.table, entries.source.cells[k] ?? 0);
	return { said: `Line ${line}, column ${column}`, where: { line, column, name, otherName } };
}

/** What the text says in entry k. */
export function entryText({ source }: TextEntries, k: number): string {
	return cellText(source.table, source.cells[k] ?? 0);
}

/** @throws {InputError} `too-many-species` */
export function refuseTooMany(count: number): void {
	if (count <= SPECIES_LIMIT) return;
	const [limit, got] = [SPECIES_LIMIT, count].map((figure) => figure.toLocaleString('en'));
	throw new InputError(
		'too-many-species',
		`Expected at most ${limit} species; this matrix has ${got}. Leave some out before bringing it.`
	);
}

/** A matrix of one species holds no pair. @throws {InputError} `too-few-species` */
export function refuseTooFew(species: readonly string[]): void {
	if (species.length >= 2) return;
	throw new InputError('too-few-species', `Expected at least 2 species; got ${species.length}.`);
}

/**
 * @param places - where each name stands, in words: “line 3”
 * @throws {InputError} `duplicate-species` with both places, `unnamed-species`
 */
export function refuseRepeats(names: readonly string[], places: (index: number) => string): void {
	const seen = new Map<string, number>();
	for (const [index, name] of names.entries()) {
		if (name === '') throw new InputError('unnamed-species', `Expected a species name; ${places(index)} has none.`);
		const before = seen.get(name.normalize('NFC'));
		if (before !== undefined) {
			const message = `Expected every species once; “${name}” stands in ${places(before)} and in ${places(index)}. Rename or remove one.`;
			throw new InputError('duplicate-species', message, { name });
		}
		seen.set(name.normalize('NFC'), index);
	}
}
