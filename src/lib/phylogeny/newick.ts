import type { Remark } from '#lib/remarks/remark.ts';
import { NewickReader, type ReadTree } from './newickReader.ts';
import { ReadingNotes } from './readingNotes.ts';
import { END, OPEN, Scanner, SEMICOLON } from './scanner.ts';
import type { NamedTree } from './tree.ts';
import { TREE_LIMIT } from './treeLimits.ts';

/**
 * Trees of a Newick text, in their order. Comments are skipped; `[&key=value]` is kept as annotations of its node, and with
 * the prefix `branch:` when it stands after the colon. A branch without a length has NaN and a remark; the length above
 * the root is left out.
 *
 * Limits: 10,000 trees, 10,000 tips in a tree; any depth. Linear in the text.
 *
 * @throws {InputError} always with line and column: `not-a-tree`, `text-after-tree`, `network`, `too-many-trees`,
 *   `too-many-tips`, `too-many-nodes`, `unbalanced-brackets`, `unbalanced-comment`, `unbalanced-quote`, `unnamed-tip`,
 *   `duplicate-tip`, `two-labels`, `missing-comma`, `bad-length`, `negative-length`
 * @see Olsen (1990), "Newick's 8:45" tree format standard
 */
export function parseNewick(text: string): { trees: NamedTree[]; remarks: Remark[] } {
	const scanner = new Scanner(text, text.startsWith('\uFEFF') ? 1 : 0);
	const notes = new ReadingNotes();
	const reader = new NewickReader(scanner, notes);
	const trees: NamedTree[] = [];
	for (let token = nextStart(scanner); token !== END; token = nextStart(scanner)) {
		if (token !== OPEN) failNoTree(scanner, trees.length);
		if (trees.length === TREE_LIMIT) failTreeLimit(scanner);
		const start = scanner.start;
		const read = reader.readTree();
		if (read.rooted === false) notes.add('unrooted', start, trees.length);
		trees.push(namedTree('', read));
	}
	if (trees.length === 0) failNoTree(scanner, 0);
	return { trees, remarks: notes.remarks(text) };
}

/** A tree with its name and what the text says of it; what it does not say is left out. */
export function namedTree(name: string, { tree, rooted }: ReadTree, isDefault = false): NamedTree {
	return { name, tree, ...(rooted === undefined ? {} : { rooted }), ...(isDefault ? { isDefault } : {}) };
}

function nextStart(scanner: Scanner): number {
	let token = scanner.next();
	while (token === SEMICOLON) token = scanner.next();
	return token;
}

function failNoTree(scanner: Scanner, treeCount: number): never {
	const found = scanner.start === scanner.text.length ? 'the end of the text' : `"${shortened(scanner.spelling())}"`;
	if (treeCount > 0) {
		const rule = `Expected another tree or nothing after tree ${treeCount}; found ${found} at {place}`;
		scanner.fail('text-after-tree', `${rule}. Take the text out, or check the brackets before it.`);
	}
	const rule = `Expected a tree, which begins with "("; found ${found} at {place}`;
	return scanner.fail('not-a-tree', `${rule}. Bring a Newick text such as "(A:1,B:1);" or a NEXUS file.`);
}

function failTreeLimit(scanner: Scanner): never {
	const start = scanner.start;
	let count = TREE_LIMIT + 1;
	let previous = OPEN;
	for (let token = scanner.next(); token !== END; token = scanner.next()) {
		if (previous === SEMICOLON && token !== SEMICOLON) count += 1;
		previous = token;
	}
	const limit = TREE_LIMIT.toLocaleString('en');
	const message = `Expected at most ${limit} trees in a text; found ${count.toLocaleString('en')}, the first too many at {place}. Thin the sample.`;
	return scanner.fail('too-many-trees', message, start);
}

function shortened(text: string): string {
	return text.length > 40 ? `${text.slice(0, 40)}…` : text;
}
