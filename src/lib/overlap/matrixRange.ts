import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { entryPlace, type MatrixEntries } from './matrixEntries.ts';
import { ROUNDING, type MatrixKind, type MatrixOptions } from './matrixReading.ts';

export type RangeFrame = { readonly kind: MatrixKind; readonly full: 1 | 100 };

/**
 * Checks that every pair lies where the measure allows: 0 to 1, and −1 to 1 for rank correlations (0 to 2 as a distance).
 * An unnamed measure may be negative too, but then it asks until `confirm.kind` is given.
 *
 * @throws {InputError} `out-of-range` with the first offending cell and how many there are
 */
export function checkRange(entries: MatrixEntries, frame: RangeFrame, options: MatrixOptions): Remark[] {
	const isSigned = options.measure === 'spearman-cells' || options.measure === 'other';
	const lowest = isSigned ? -1 : 0;
	const [low, high] = frame.kind === 'similarity' ? [lowest, 1] : [0, 1 - lowest];
	const bounds = { low: low * frame.full, high: high * frame.full };
	refuseOutside(entries, bounds, options.measure);
	const beyond =
		frame.kind === 'similarity'
			? firstPair(entries, (v) => v < -ROUNDING)
			: firstPair(entries, (v) => v > frame.full * (1 + ROUNDING));
	if (beyond === undefined || options.measure === 'spearman-cells' || options.confirm?.kind !== undefined) return [];
	const { said, where } = entryPlace(entries, beyond);
	const message = `${said}: ${entries.value[beyond] ?? 0} is a negative overlap, as correlations have. If they are rank correlations over cells, say so as the measure; else confirm the kind.`;
	return [remark('settle', 'negative-overlap', message, where)];
}

function firstPair({ from, to, value }: MatrixEntries, test: (value: number) => boolean): number | undefined {
	const found = value.findIndex((number, k) => from[k] !== to[k] && test(number));
	return found === -1 ? undefined : found;
}

function refuseOutside(entries: MatrixEntries, { low, high }: { low: number; high: number }, measure: string): void {
	const slack = ROUNDING * Math.max(1, high);
	const isOutside = (value: number) => value < low - slack || value > high + slack;
	const first = firstPair(entries, isOutside);
	if (first === undefined) return;
	let count = 0;
	for (const [k, value] of entries.value.entries()) if (entries.from[k] !== entries.to[k] && isOutside(value)) count += 1;
	const { said, where } = entryPlace(entries, first);
	const value = entries.value[first] ?? 0;
	const others = count === 1 ? '' : ` It is the first of ${count} such cells.`;
	const signed = value < 0 && measure !== 'spearman-cells' ? ' Only rank correlations over cells may be negative.' : '';
	throw new InputError(
		'out-of-range',
		`${said}: expected a value from ${low} to ${high}; got ${value}.${signed}${others}`,
		where
	);
}
