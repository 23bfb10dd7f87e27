import { overlapRunRequestSchema, type OverlapRunRequest } from '#lib/contracts/materials.ts';
import { MATRIX_TEXT_LIMIT_BYTES } from './bytes.ts';
import { checked } from './checked.ts';
import { refuseLargeText } from './readBody.ts';
import { Refusal } from './refusal.ts';

/**
 * The body of a new overlap run.
 * @throws {Refusal} 400 when it is malformed · 413 for a long text · 422 `not-offered-yet` for a run to be computed
 */
export function checkOverlapRun(value: unknown): OverlapRunRequest {
	if (typeof value === 'object' && value !== null && 'source' in value) {
		throw new Refusal(
			422,
			'not-offered-yet',
			'Overlap computed from maps or records (`source`) is not offered yet. Send the finished overlaps as `matrix` or `csv`.'
		);
	}
	const body = checked(overlapRunRequestSchema, value, 'body');
	refuseLargeText(body.csv ?? '', MATRIX_TEXT_LIMIT_BYTES, 'a matrix text');
	return body;
}
