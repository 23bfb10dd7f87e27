/** Where what stands in the way of an analysis is settled; null when that is a choice in the plan itself. */
export function settleAt(code: string, study: string): { readonly text: string; readonly href: string } | null {
	if (IN_THE_PLAN.has(code)) return null;
	const page = ABOUT_NAMES.has(code) ? 'names' : 'materials';
	return { text: page === 'names' ? 'Look at the names' : 'Look at the materials', href: `/studies/${study}/${page}` };
}

const IN_THE_PLAN: ReadonlySet<string> = new Set([
	'choose-a-tree',
	'no-such-tree',
	'age-zero',
	'missing-pairs',
	'too-many-species'
]);
const ABOUT_NAMES: ReadonlySet<string> = new Set(['too-few-species', 'unknown-species', 'dropped-species']);
