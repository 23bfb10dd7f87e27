/**
 * Where what stands in the way of an analysis is settled; null when that is a choice in the plan itself.
 * @param run - id of the overlap run, where one is at hand
 */
export function settleAt(code: string, study: string, run = ''): { readonly text: string; readonly href: string } | null {
	// The page of a run proposes the fewest species to leave out, and takes the decision.
	if (code === 'missing-pairs' && run !== '')
		return { text: 'Look at what is missing', href: `/studies/${study}/overlaps/${run}` };
	if (IN_THE_PLAN.has(code)) return null;
	const page = ABOUT_NAMES.has(code) ? 'names' : 'materials';
	return { text: page === 'names' ? 'Look at the names' : 'Look at the materials', href: `/studies/${study}/${page}` };
}

const IN_THE_PLAN: ReadonlySet<string> = new Set([
	'tips-differ',
	'no-such-tree',
	'age-zero',
	'missing-pairs',
	'too-many-species'
]);
const ABOUT_NAMES: ReadonlySet<string> = new Set(['too-few-species', 'unknown-species', 'dropped-species']);
