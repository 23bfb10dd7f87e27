import { fail } from '@sveltejs/kit';
import { acceptAllForm, leaveOutForm, pairNamesForm, withdrawForm } from '#lib/contracts/nameForms.ts';
import { Refusal } from '#lib/server/api/refusal.ts';
import { settleNames } from '#lib/server/api/settleNames.ts';
import { parseForm } from '#lib/server/parseForm.ts';
import { can, type Access } from '#lib/server/permissions.ts';
import * as names from '#lib/server/repositories/names.ts';
import type { RequestEvent } from './$types';

type Decision = { readonly from: string; readonly to: string | null; readonly why: string };

/** What was decided in one sentence, and the names by which it can be undone. */
type Done = { readonly sentence: string; readonly names: readonly string[] };
type Refused = { readonly message: string; readonly values: Readonly<Record<string, string>> };
const refused = (message: string, values: Refused['values'] = {}) => fail(422, { done: null, refused: { message, values } });

export async function pairNames({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, pairNamesForm);
	if (!form.ok) return refused(Object.values(form.faults)[0] ?? 'Choose a name.', form.values);
	const { from, to, why } = form.value;
	return decide(access, [{ from, to, why }], { sentence: `“${from}” is “${to}”.`, values: { from, to, why } });
}

export async function leaveOut({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, leaveOutForm);
	if (!form.ok) return refused(Object.values(form.faults)[0] ?? 'Choose a name.', form.values);
	const { names: left, why } = form.value;
	const decisions = left.map((from) => ({ from, to: null, why }));
	const sentence = left.length === 1 ? `“${left[0] ?? ''}” is left out.` : `${left.length} names are left out.`;
	return decide(access, decisions, { sentence, values: { names: left.join('\n'), why } });
}

/** Everything proposed is accepted at once, or everything tidied is confirmed with one’s name. */
export async function acceptAll({ params, request, locals, url }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, acceptAllForm);
	if (!form.ok) return refused('Nothing to accept.');
	const matching = await names.matching(access, comparedIn(url));
	const rows = (matching?.rows ?? []).filter(({ kind, decision }) => kind === form.value.kind && decision === undefined);
	const why = form.value.kind === 'probable' ? 'near spelling, accepted' : 'accepted after tidying';
	const decisions = rows.flatMap(({ species, tip }) =>
		species === undefined || tip === undefined ? [] : [{ from: species, to: tip, why }]
	);
	if (decisions.length === 0) return refused('Nothing was left to accept.');
	return decide(access, decisions, {
		sentence: `${decisions.length === 1 ? 'One match is' : `${decisions.length} matches are`} accepted.`,
		values: {}
	});
}

export async function undo({ params, request, locals }: RequestEvent) {
	const access = await can(locals.user, 'change', { study: params.study });
	const form = await parseForm(request, withdrawForm);
	if (!form.ok) return refused('Nothing to undo.');
	await names.withdraw(access, form.value.names);
	const done: Done = {
		sentence: form.value.names.length === 1 ? `Undone for “${form.value.names[0] ?? ''}”.` : 'Undone.',
		names: []
	};
	return { done, refused: null };
}

type Told = { readonly sentence: string; readonly values: Refused['values'] };

/** Names are kept as the materials show them; one that is in none of them is refused with what was typed. */
async function decide(access: Access, decisions: readonly Decision[], { sentence, values }: Told) {
	try {
		const settled = await settleNames(access, decisions);
		await names.decide(access, settled);
		return { done: { sentence, names: settled.map(({ from }) => from) } satisfies Done, refused: null };
	} catch (thrown) {
		if (!(thrown instanceof Refusal)) throw thrown;
		return refused(wordsOf(thrown), values);
	}
}

/** The same refusals as a script gets, without the names of its fields. */
function wordsOf({ code, message }: Refusal): string {
	const named = message.slice(message.lastIndexOf(': ') + 2).replace(/\.$/, '');
	if (code === 'unknown-tip') return `The tree has no tip “${named}”. Choose one of the list.`;
	if (code === 'unknown-species') return `Neither matrix nor tree has a name “${named}”. Choose one of the list.`;
	return message;
}

export function comparedIn(url: URL): names.Compared {
	const [treeSet, overlapRun] = [url.searchParams.get('tree'), url.searchParams.get('run')];
	return { ...(treeSet === null ? {} : { treeSet }), ...(overlapRun === null ? {} : { overlapRun }) };
}
