import { pageWords } from '#lib/analysis/words/pageWords.ts';
import { answersForm, keepForm, type Answers, type MaterialKind } from '#lib/contracts/materialForms.ts';
import { InputError } from '#lib/remarks/inputError.ts';
import type { Place } from '#lib/remarks/remark.ts';
import type { Access } from '#lib/server/access.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import * as openings from '#lib/server/repositories/openings.ts';
import * as covariates from '#lib/server/repositories/covariates.ts';
import * as nicheTables from '#lib/server/repositories/nicheTables.ts';
import * as overlapRuns from '#lib/server/repositories/overlapRuns.ts';
import * as treeSets from '#lib/server/repositories/treeSets.ts';
import type { z } from 'zod';
import type { Draft, Refused } from './draft.ts';
import { excerpt } from './excerpt.ts';
import { keptBeside, type KeptBeside } from './keptBeside.server.ts';
import { kindOfText } from './kindOfText.ts';
import { covariateRequest, lookAtCovariate } from './lookAtCovariate.server.ts';
import { lookAtNiches, nicheTableRequest } from './lookAtNiches.server.ts';
import { lookAtMatrix, overlapRunRequest } from './lookAtMatrix.server.ts';
import { lookAtTrees, treeSetRequest } from './lookAtTrees.server.ts';
import { labelOf } from './proposeLabel.ts';
import { textOf, type Upload } from './readUpload.server.ts';
import { withGuesses } from './withGuesses.ts';

type Kind = MaterialKind;

/** A text as the program understands it; what cannot be read is told in the draft, with the text. */
export async function lookAt(upload: Upload, beside: KeptBeside): Promise<Draft> {
	const given = withGuesses(upload, beside.former);
	const parsed = answersForm.safeParse(given);
	const faults = parsed.success ? {} : faultsOf(parsed.error);
	const answers = parsed.success ? parsed.data : answersForm.parse({ readAs: given['readAs'] ?? '' });
	const { text, kind, seen } = await seenIn(upload, answers, given);
	const { former, taken } = beside;
	const ground = { fileName: upload.name, kind, measure: given['measure'], former: former?.label };
	const label = labelOf(given['label'] ?? '', { ...ground, taken: kind === null ? [] : taken[kind] });
	return { name: upload.name, text, label, answers: given, seen, faults };
}

const LOOKS = { trees: lookAtTrees, matrix: lookAtMatrix, covariate: lookAtCovariate, niches: lookAtNiches };

type Seen = { readonly text: string; readonly kind: Kind | null; readonly seen: Draft['seen'] };

async function seenIn(upload: Upload, answers: Answers, given: Draft['answers']): Promise<Seen> {
	let text = '';
	let kind: Kind | null = null;
	try {
		text = textOf(upload);
		kind = answers.readAs ?? kindOfText(text);
		return {
			text,
			kind,
			seen: await LOOKS[kind](text, answers, given)
		};
	} catch (thrown) {
		return { text, kind, seen: refusedBy(thrown, text, kind) };
	}
}

function refusedBy(thrown: unknown, text: string, kind: Kind | null): Refused {
	if (!(thrown instanceof InputError) && !(thrown instanceof Refusal)) throw thrown;
	const where: Place | undefined = thrown instanceof InputError ? thrown.where : undefined;
	return {
		...{ kind: 'refused', readAs: kind, code: thrown.code, message: pageWords(thrown.message) },
		excerpt: excerpt(text, where, kind === 'trees' || kind === null ? 'signs' : 'cells'),
		place: where?.line === undefined ? null : { line: where.line, column: kind === 'trees' ? (where.column ?? null) : null }
	};
}

function faultsOf(error: z.ZodError): Record<string, string> {
	return Object.fromEntries(error.issues.map(({ path, message }) => [String(path[0] ?? 'form'), message]).reverse());
}

export type Kept =
	{ readonly ok: true; readonly kind: Kind; readonly id: string } | { readonly ok: false; readonly draft: Draft };

/** Keeps a text that was looked at, in the place of another material where one is named; refused, it comes back as a draft. */
export async function keep(access: Access, upload: Upload, replaces: { kind: Kind; id: string } | null): Promise<Kept> {
	const draft = await lookAt(upload, await keptBeside(access, replaces));
	const typed = (draft.answers['label'] ?? '').trim();
	// An emptied name is asked for; a proposal that was taken since it was made is numbered.
	const parsed = keepForm.safeParse({ ...draft.answers, label: typed === '' ? '' : draft.label });
	if (!parsed.success)
		return { ok: false, draft: { ...draft, label: upload.fields['label'] ?? '', faults: faultsOf(parsed.error) } };
	const { kind } = draft.seen;
	if (kind === 'refused') return { ok: false, draft };
	if (replaces !== null && replaces.kind !== kind)
		return { ok: false, draft: { ...draft, faults: { form: otherKind(replaces.kind, kind) } } };
	if (kind === 'matrix' && parsed.data.measure === undefined) {
		return { ok: false, draft: { ...draft, faults: { measure: 'Choose the measure; the report names it.' } } };
	}
	const id = await store(access, { kind, replaces: replaces?.id ?? null, text: draft.text }, parsed.data);
	return id === null
		? { ok: false, draft: { ...draft, faults: { form: 'What it should replace is not in this study any more.' } } }
		: { ok: true, kind, id };
}

const KIND_WORDS = {
	trees: { one: 'tree', is: 'holds trees' },
	matrix: { one: 'matrix', is: 'is a matrix of overlaps' },
	covariate: { one: 'covariate', is: 'is a covariate' },
	niches: { one: 'table of niche positions', is: 'is a table of niche positions' }
} as const;

function otherKind(replaced: Kind, kind: Kind): string {
	const { one } = KIND_WORDS[replaced];
	return `A ${one} can be replaced by a ${one} only; this text ${KIND_WORDS[kind].is}. Keep it beside the ${one} instead.`;
}

type Keeping = { readonly kind: Kind; readonly replaces: string | null; readonly text: string };

async function store(
	access: Access,
	{ kind, replaces, text }: Keeping,
	{ label, ...answers }: Answers & { label: string }
): Promise<string | null> {
	if (kind === 'trees') {
		const request = treeSetRequest(label, text, answers);
		const kept = replaces === null ? await treeSets.create(access, request) : await treeSets.replace(access, replaces, request);
		return kept?.id ?? null;
	}
	if (kind === 'niches') {
		const request = nicheTableRequest(label, text);
		const kept =
			replaces === null ? await nicheTables.create(access, request) : await nicheTables.replace(access, replaces, request);
		return kept?.id ?? null;
	}
	if (kind === 'covariate') {
		const request = covariateRequest(label, text, answers);
		const kept =
			replaces === null ? await covariates.create(access, request) : await covariates.replace(access, replaces, request);
		return kept?.id ?? null;
	}
	const request = overlapRunRequest(label, text, answers);
	const kept =
		replaces === null ? await overlapRuns.create(access, request) : await overlapRuns.replace(access, replaces, request);
	// The page draws a matrix before it is kept.
	if (kept !== null) await openings.note(access, kept, 'brought');
	return kept?.id ?? null;
}
