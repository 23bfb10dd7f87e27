import { InputError } from '#lib/remarks/inputError.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import * as texts from '#lib/server/repositories/texts.ts';
import { treeInText, type TreeSet } from '#lib/server/repositories/treeSetRows.ts';
import { tinyTree } from '../tinyTree.ts';

/** Larger texts are not read again for the sake of a thumbnail; tips in the text. */
const DRAWN_UP_TO_TIPS = 20_000;
/** Lines of more tips would run into one another. */
const TIPS_TOLD_APART = 400;

/** One tree of a text as a path; null when it has no ages, or too many tips to be told apart. */
export async function drawTree(text: string, tree: number, { tipCount }: { tipCount: number }): Promise<string | null> {
	if (tipCount > TIPS_TOLD_APART) return null;
	try {
		return tinyTree(await compute('treeStructure', { text, tree, spreadConfirmed: true }));
	} catch (refused) {
		// A tree without ages, or whose tips end far apart, can be kept but not drawn.
		if (refused instanceof InputError) return null;
		throw refused;
	}
}

/** The first tree of a set that is used, drawn small. */
export async function drawTreeSet({ textHash, chosen, tipCount, treeCount, rootAge }: TreeSet): Promise<string | null> {
	const treesInText = chosen.burnIn + treeCount * chosen.thin;
	if (rootAge === null || tipCount * treesInText > DRAWN_UP_TO_TIPS) return null;
	return drawTree(await texts.load(textHash), treeInText(chosen, 0), { tipCount });
}
