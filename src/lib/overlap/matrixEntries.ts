import { InputError } from '#lib/remarks/inputError.ts';
import type { Place } from '#lib/remarks/remark.ts';
import { SPECIES_LIMIT } from './matrixReading.ts';

/**
 * The cells of a matrix that hold something, in the order of the text: cell k belongs to species `from[k]` and `to[k]`
 * (row and column of a square). `line` and `column` count from 1 in rows and cells of the text; 0 when there is no text.
 */
export type EntryPlaces = {
	readonly species: readonly string[];
	readonly from: ArrayLike<number>;
	readonly to: ArrayLike<number>;
	readonly line: ArrayLike<number>;
	readonly column: ArrayLike<number>;
};
export type TextEntries = EntryPlaces & { readonly text: readonly string[] };
export type MatrixEntries = EntryPlaces & { readonly value: Float64Array };

export type EntryPlace = { readonly said: string; readonly where: Place };

/** Where cell k stands, for a message and for a machine. */
export function entryPlace(entries: EntryPlaces, k: number): EntryPlace {
	const { line, column } = { line: entries.line[k] ?? 0, column: entries.column[k] ?? 0 };
	const name = entries.species[entries.from[k] ?? -1] ?? '';
	const otherName = entries.species[entries.to[k] ?? -1] ?? '';
	if (line === 0) return { said: `Row “${name}”, column “${otherName}”`, where: { name, otherName } };
	return { said: `Line ${line}, column ${column}`, where: { line, column, name, otherName } };
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
