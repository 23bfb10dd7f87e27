import { headlineWords } from '#lib/analysis/words/headlineWords.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Access } from '#lib/server/access.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import * as analyses from '#lib/server/repositories/analyses.ts';
import * as names from '#lib/server/repositories/names.ts';
import type { ListedRun } from '#lib/server/repositories/overlapRunRows.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as reports from '#lib/server/repositories/reports.ts';
import * as texts from '#lib/server/repositories/texts.ts';
import { treeInText, type TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import { findRenewals } from './analyses/renewals.server.ts';
import { questionParts } from './questionParts.ts';
import { restsOnOld } from './reports/restsOnOld.server.ts';
import { tinyTree } from './tinyTree.ts';
import { tinyWing } from './tinyWing.ts';

/** Larger texts are not read again for the sake of a thumbnail; unit: tips in the text. */
const DRAWN_UP_TO_TIPS = 20_000;
const WINGS_SHOWN = 6;
const LINES_SHOWN = 5;

/** What the home of a study shows besides its margin. */
export async function studyHome(access: Access, study: string) {
	const trees = await treeSets.list(access);
	const runs = await overlapRuns.list(access);
	const asked = await analyses.list(access);
	const saved = await reports.list(access);
	const pairs = (await names.matching(access))?.pairs ?? null;
	const drawable = await openings.drawable(access, runs);
	const renewed = new Set((await findRenewals(access, asked)).map(({ before }) => before));
	const order = dataOrder(trees[0]?.tips ?? [], pairs ?? []);
	return {
		asked: questionParts({ study, sharedSpecies: pairs?.length ?? null, ...choicesOf({ trees, runs, plan: asked[0]?.plan }) }),
		trees: trees.map(treeFacts),
		drawing: await drawnTree(trees),
		runs: await Promise.all(
			runs.slice(0, WINGS_SHOWN).map(({ id, label }) => thumbnail(access, { id, label, order: drawable.has(id) ? order : null }))
		),
		moreRuns: Math.max(0, runs.length - WINGS_SHOWN),
		analyses: await Promise.all(
			asked
				.slice(0, LINES_SHOWN)
				.map(async (listed) => ({ ...(await analysisLine(access, listed)), isRenewed: renewed.has(listed.id) }))
		),
		wasRenewed: renewed.size > 0,
		moreAnalyses: Math.max(0, asked.length - LINES_SHOWN),
		reports: await Promise.all(saved.slice(0, LINES_SHOWN).map((report) => reportLine(access, report, asked)))
	};
}

type Kept = { trees: readonly TreeSet[]; runs: readonly ListedRun[]; plan: Plan | undefined };

/** What was asked last, as far as it still stands; else the newest materials. */
function choicesOf({ trees, runs, plan }: Kept) {
	const tree = trees.find(({ id }) => id === plan?.treeSet) ?? trees[0];
	const run = runs.find(({ id }) => id === plan?.overlapRun) ?? runs[0];
	return {
		measure: run?.measure ?? null,
		trees:
			tree === undefined
				? null
				: { label: tree.label, treeCount: tree.treeCount, tree: tree.id === plan?.treeSet ? plan.tree : ('all' as const) },
		alternative: plan?.alternative ?? ('less' as const)
	};
}

function treeFacts({ id, label, kind, treeCount, tipCount, rootAge, ageUnit, ultrametricSpread, polytomies }: TreeSet) {
	return { id, label, kind, treeCount, tipCount, rootAge, ageUnit, ultrametricSpread, polytomies };
}

/** The newest summary tree as a path, else the newest tree; null when there is none or its text is long. */
async function drawnTree(trees: readonly TreeSet[]): Promise<string | null> {
	const short = trees.filter(({ tipCount, treeCount, rootAge }) => rootAge !== null && tipCount * treeCount <= DRAWN_UP_TO_TIPS);
	const chosen = short.find(({ kind }) => kind === 'summary') ?? short[0];
	if (chosen === undefined) return null;
	const text = await texts.load(chosen.textHash);
	const tree = treeInText(chosen.chosen, 0);
	try {
		return tinyTree(await compute('treeStructure', { text, tree, spreadConfirmed: chosen.spreadConfirmed }));
	} catch (refused) {
		// A tree that still needs a person, such as one whose tips end apart, is kept but has no ages to draw.
		if (refused instanceof InputError) return null;
		throw refused;
	}
}

/** Names of the data in tree order. */
function dataOrder(tips: readonly string[], pairs: readonly { readonly tip: string; readonly species: string }[]): string[] {
	const nameOf = new Map(pairs.map(({ tip, species }) => [tip, species]));
	return tips.map((tip) => nameOf.get(tip) ?? tip);
}

type Thumbnail = { id: string; label: string; /** null where it stays folded */ order: readonly string[] | null };

async function thumbnail(access: Access, { id, label, order }: Thumbnail) {
	const run = order === null ? null : await overlapRuns.find(access, id);
	return { id, label, wing: run === null || order === null ? null : tinyWing(run, order) };
}

async function analysisLine(access: Access, listed: analyses.ListedAnalysis) {
	const { id, status, headline, failure, plan, createdAt, finishedAt, treeSetId } = listed;
	const tree = await treeSets.findKept(access, treeSetId);
	return {
		id,
		status,
		title: headline?.title ?? null,
		figures:
			headline === null ? null : headlineWords(headline, { alternative: plan.alternative, ageUnit: tree?.ageUnit ?? 'Ma' }),
		failure: failure?.message ?? null,
		at: finishedAt ?? createdAt,
		isOutOfDate: status === 'finished' && (await analyses.outOfDate(access, listed)).length > 0
	};
}

async function reportLine(access: Access, report: reports.Report, asked: readonly analyses.ListedAnalysis[]) {
	const { id, title, author, changedAt } = report;
	return { id, title, author, changedAt, isOutOfDate: await restsOnOld(access, report, asked) };
}
