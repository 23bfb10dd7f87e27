import { correctedI, uncorrectedIRemark } from '#lib/overlap/uncorrectedI.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { Access } from '#lib/server/access.ts';
import { squareRows } from '#lib/server/api/squareRows.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import { matrixOf, type ListedRun } from '#lib/server/repositories/overlapRunRows.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';

/** Larger matrices are not compared each time the page is opened. */
const COMPARED_UP_TO_SPECIES = 1000;

/**
 * Whether the newest matrix of I holds the form printed in 2008, told by the newest D beside it; null without both, or when
 * they agree.
 */
export async function printedFormRemark(
	access: Access,
	runs: readonly ListedRun[]
): Promise<{ run: string; remark: Remark } | null> {
	const newest = (measure: string) => runs.find((run) => run.measure === measure && run.species.length <= COMPARED_UP_TO_SPECIES);
	const [i, d] = [newest('warren-i'), newest('schoener-d')];
	if (i === undefined || d === undefined) return null;
	const [iRun, dRun] = [await overlapRuns.find(access, i.id), await overlapRuns.find(access, d.id)];
	if (iRun === null || dRun === null) return null;
	const found = uncorrectedIRemark(matrixOf(iRun), matrixOf(dRun));
	return found === undefined ? null : { run: i.id, remark: found };
}

const MOST_CHARACTERS = 200;
const SUFFIX = ', corrected';

/**
 * Keeps the corrected matrix beside the one that was brought.
 * @throws {InputError} `out-of-range` when the matrix cannot be of the printed form
 */
export async function keepCorrected(access: Access, id: string): Promise<string | null> {
	const run = await overlapRuns.find(access, id);
	if (run === null) return null;
	const { species, values } = correctedI(matrixOf(run));
	const rows = squareRows(values, species.length).map((row) => row.map((value) => (Number.isNaN(value) ? null : value)));
	const label = run.label.slice(0, MOST_CHARACTERS - SUFFIX.length) + SUFFIX;
	const kept = await overlapRuns.create(access, { label, measure: 'warren-i', matrix: { species: [...species], values: rows } });
	await openings.inherit(access, kept, { access, id });
	return kept.id;
}
