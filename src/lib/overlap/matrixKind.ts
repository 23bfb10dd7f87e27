import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { entryPlace, type MatrixEntries } from './matrixEntries.ts';
import type { MatrixKind, MatrixOptions } from './matrixReading.ts';
import { isAll, isAt, kindOfHeader, type Judged, type Split } from './matrixScale.ts';

/** What was seen before the kind is judged: diagonal and pairs, the value a full overlap has, a pair list's header. */
export type KindEvidence = { readonly split: Split; readonly full: 1 | 100; readonly header: string };

/**
 * Similarity or distance, told from the diagonal: 1 or 0. Asks when it reads as a distance, until `confirm.kind` is given.
 * @throws {InputError} `mixed-diagonal` when the diagonal is neither all 1 nor all 0
 */
export function judgeKind(entries: MatrixEntries, evidence: KindEvidence, options: MatrixOptions): Judged<MatrixKind> {
	const { diagonal } = evidence.split;
	const seen = isAll(diagonal, evidence.full) ? 'similarity' : isAll(diagonal, 0) ? 'distance' : undefined;
	if (diagonal.length > 0 && seen === undefined) refuseMixed(entries, evidence.full);
	const confirmed = options.confirm?.kind;
	if (confirmed !== undefined) return { value: confirmed, remarks: againstDiagonal(confirmed, seen) };
	const guess = seen ?? kindOfHeader(evidence.header);
	if (guess === 'distance') {
		const sign = seen === undefined ? `The column is called “${evidence.header}”` : 'The diagonal is 0';
		const message = `${sign}, so the matrix reads as a distance; 1 − value will be used. Confirm the kind: distance or similarity.`;
		return { value: 'distance', remarks: [remark('settle', 'similarity-or-distance', message)] };
	}
	if (guess === 'similarity') return { value: guess, remarks: [] };
	const message =
		'Nothing says whether the values are similarities or distances (there is no diagonal); similarities are assumed: 1 is full overlap. Look at a pair you know.';
	return { value: 'similarity', remarks: [remark('look', 'similarity-assumed', message)] };
}

function againstDiagonal(confirmed: MatrixKind, seen: MatrixKind | undefined): Remark[] {
	if (seen === undefined || seen === confirmed) return [];
	const [word, figure] = confirmed === 'similarity' ? ['similarities', 0] : ['distances', 1];
	const message = `Read as ${word}, as confirmed, though the diagonal is ${figure}; the diagonal is not used.`;
	return [remark('look', 'diagonal-against-kind', message)];
}

function refuseMixed(entries: MatrixEntries, full: number): never {
	const { from, to, value, species } = entries;
	const onDiagonal = [...value.keys()].filter((k) => from[k] === to[k]);
	const first = onDiagonal[0] ?? 0;
	const target = isAt(value[first] ?? 0, 0) ? 0 : full;
	const odd = onDiagonal.find((k) => !isAt(value[k] ?? 0, target)) ?? first;
	const { said, where } = entryPlace(entries, odd);
	const name = (k: number) => `“${species[from[k] ?? -1] ?? ''}” has ${value[k] ?? 0}`;
	const against = odd === first ? '' : ` where ${name(first)}`;
	const message = `${said}: expected every species to have ${full} with itself (similarities) or 0 (distances); ${name(odd)}${against}.`;
	throw new InputError('mixed-diagonal', message, where);
}
