import { pageWords } from '#lib/analysis/words/pageWords.ts';
import { error, fail, redirect } from '@sveltejs/kit';
import {
	aboutTreeForm,
	confirmOf,
	materialForm,
	renameMaterialForm,
	settleMaterialForm,
	type MaterialName
} from '#lib/contracts/materialForms.ts';
import { confirmSchema } from '#lib/contracts/materials.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import { startAnalysis } from '#lib/server/api/startAnalysis.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can, type Access } from '#lib/server/permissions.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { RequestEvent } from './$types';
import { keepCorrected } from './printedForm.server.ts';
import { staleAnalyses, type Stale } from './staleAnalyses.ts';

const NOT_FOUND = 'That material is not in this study any more.';
const REPOSITORIES = { trees: treeSets, matrix: overlapRuns, covariate: covariates, niches: nicheTables };
const repositoryOf = ({ kind }: MaterialName) => REPOSITORIES[kind];
const objectOf = ({ kind, id }: MaterialName) =>
	({ trees: { treeSet: id }, matrix: { overlapRun: id }, covariate: { covariate: id }, niches: { nicheTable: id } })[kind];
const pageOf = (study: string, query = '') => `/studies/${study}/materials${query}`;

export async function renameMaterial({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, renameMaterialForm);
	if (!form.ok)
		return fail(400, {
			care: { material: form.values['material'] ?? '', values: form.values, message: form.faults['label'] ?? NOT_FOUND }
		});
	const { material, label } = form.value;
	if (!(await repositoryOf(material).rename(access, material.id, label))) error(404, NOT_FOUND);
	redirect(303, pageOf(params.study));
}

/** A second one to settle or correct otherwise; the first stays as it is for what rests on it. */
export async function copyMaterial({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'create', { study: params.study });
	const form = await parseForm(request, materialForm);
	if (!form.ok) error(404, NOT_FOUND);
	const copied = await repositoryOf(form.value.material).copy(access, form.value.material.id);
	if (copied === null) error(404, NOT_FOUND);
	redirect(303, pageOf(params.study, `?kept=${copied.id}`));
}

export async function removeMaterial({ params, request, locals }: RequestEvent) {
	const form = await parseForm(request, materialForm);
	if (!form.ok) error(404, NOT_FOUND);
	const { material } = form.value;
	const access = await can(locals.user, 'delete', objectOf(material));
	if (!(await repositoryOf(material).remove(access, material.id))) error(404, NOT_FOUND);
	redirect(303, pageOf(params.study, `?deleted=${material.id}`));
}

export async function restoreMaterial({ params, request, locals }: RequestEvent) {
	const form = await parseForm(request, materialForm);
	if (!form.ok) error(404, NOT_FOUND);
	const { material } = form.value;
	const access = await can(locals.user, 'restore', objectOf(material));
	if (!(await repositoryOf(material).restore(access, material.id))) error(404, NOT_FOUND);
	redirect(303, pageOf(params.study));
}

/** Answers what a kept material still asks. */
export async function settleMaterial({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, settleMaterialForm);
	if (!form.ok)
		return fail(400, {
			care: { material: form.values['material'] ?? '', values: form.values, message: Object.values(form.faults)[0] ?? NOT_FOUND }
		});
	const { material, ...answers } = form.value;
	const confirm = confirmOf(answers);
	const care = { material: `${material.kind}:${material.id}`, values: {} };
	if (Object.keys(confirm).length === 0) return fail(400, { care: { ...care, message: 'Choose an answer first.' } });
	try {
		const settled =
			material.kind === 'trees'
				? await treeSets.confirmSpread(access, material.id)
				: material.kind === 'matrix'
					? await settleRun(access, material.id, confirm)
					: await covariates.settle(access, material.id, confirm);
		if (!settled) error(404, NOT_FOUND);
	} catch (thrown) {
		if (!(thrown instanceof InputError)) throw thrown;
		return fail(422, { care: { ...care, message: pageWords(thrown.message) } });
	}
	redirect(303, pageOf(params.study));
}

/** What only the author of a tree knows. Names of placed tips that the tree does not have are refused, with what was typed. */
export async function describeTree({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, aboutTreeForm);
	if (!form.ok)
		return fail(400, {
			care: { material: form.values['material'] ?? '', values: form.values, message: Object.values(form.faults)[0] ?? NOT_FOUND }
		});
	const { material, about } = form.value;
	const found = material.kind === 'trees' ? await treeSets.find(access, material.id) : null;
	if (found === null) error(404, NOT_FOUND);
	const unknown = about.placedTips.filter((tip) => !found.tips.includes(tip));
	if (unknown.length > 0) {
		const message = `“${found.label}” has no tip ${unknown.slice(0, 3).join(', ')}. Write the names as they stand in the tree, one a line.`;
		const typed = { ...about, speciesInClade: String(about.speciesInClade ?? ''), placedTips: about.placedTips.join('\n') };
		return fail(422, { care: { material: `${material.kind}:${material.id}`, values: typed, message } });
	}
	await treeSets.describe(access, material.id, about);
	redirect(303, pageOf(params.study, `#material-${material.id}`));
}

/** The two of a run’s readings that a confirmation can hold on to. */
const readingSchema = confirmSchema.pick({ kind: true, scale: true }).loose();

/** What the text was read as stays as it is, where it is not asked about. */
async function settleRun(access: Access, id: string, confirm: ReturnType<typeof confirmOf>): Promise<boolean> {
	const run = await overlapRuns.findListed(access, id);
	if (run === null) return false;
	const isSure = (...codes: string[]) => !run.remarks.some(({ code }) => codes.includes(code));
	const { kind, scale } = readingSchema.parse(run.reading);
	const read = {
		...(isSure('similarity-or-distance', 'similarity-assumed', 'negative-overlap') ? { kind } : {}),
		...(isSure('percent-or-fraction') ? { scale } : {})
	};
	return overlapRuns.settle(access, id, { ...read, ...confirm });
}

export async function correctMaterial({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'create', { study: params.study });
	const form = await parseForm(request, materialForm);
	if (!form.ok) error(404, NOT_FOUND);
	try {
		const id = await keepCorrected(access, form.value.material.id);
		if (id === null) error(404, NOT_FOUND);
		redirect(303, pageOf(params.study, `?kept=${id}`));
	} catch (thrown) {
		if (!(thrown instanceof InputError)) throw thrown;
		return fail(422, { care: { material: `matrix:${form.value.material.id}`, values: {}, message: pageWords(thrown.message) } });
	}
}

/** Runs every analysis again that rested on what this material replaced. */
export async function runAgain({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'run', { study: params.study });
	const form = await parseForm(request, materialForm);
	if (!form.ok) error(404, NOT_FOUND);
	const { id, kind } = form.value.material;
	const materials = [
		await treeSets.list(access),
		await treeSets.listDeleted(access),
		await overlapRuns.list(access),
		await overlapRuns.listDeleted(access),
		await covariates.list(access),
		await covariates.listDeleted(access),
		await nicheTables.list(access),
		await nicheTables.listDeleted(access)
	];
	const stale = staleAnalyses(await analyses.list(access), materials.flat()).filter(({ through }) => through.includes(id));
	const refused: string[] = [];
	for (const one of stale) {
		const message = await renew(access, one);
		if (message !== null) refused.push(message);
	}
	if (refused.length > 0)
		return fail(422, { care: { material: `${kind}:${id}`, values: {}, message: notAllRun(refused, stale.length) } });
	redirect(303, `/studies/${params.study}/analyses/changes`);
}

function notAllRun(refused: readonly string[], asked: number): string {
	const others = refused.length < asked ? ' The others are run again; the list of analyses tells what changed in them.' : '';
	return `${[...new Set(refused)].join(' ')}${others}`;
}

/** @returns the sentence of a refusal, null when it waits to run */
async function renew(access: Access, { renewed }: Stale): Promise<string | null> {
	try {
		await startAnalysis(access, renewed);
		return null;
	} catch (thrown) {
		if (thrown instanceof InputError || thrown instanceof Refusal) return pageWords(thrown.message);
		throw thrown;
	}
}
