import { settleAt } from '../settleAt.ts';

/** What helps after a failure: the same again, another plan, or a page where something is settled first. */
export type Remedy =
	| { readonly kind: 'again' }
	| { readonly kind: 'plan' }
	| { readonly kind: 'settle'; readonly text: string; readonly href: string };

/** The program failed, not the data. */
const OURS: ReadonlySet<string> = new Set(['program-failed', 'interrupted-too-often']);

export function remedyOf(code: string | undefined, study: string): Remedy {
	if (code === undefined || OURS.has(code)) return { kind: 'again' };
	const settle = settleAt(code, study);
	return settle === null ? { kind: 'plan' } : { kind: 'settle', ...settle };
}
