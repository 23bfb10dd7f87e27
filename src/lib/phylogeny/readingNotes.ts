import { remark, type Remark, type RemarkLevel } from '#lib/remarks/remark.ts';
import { placeAt, placeInWords } from './placeAt.ts';

/** What reading a tree text can notice without refusing it. */
export type ReadingCode =
	'missing-length' | 'missing-semicolon' | 'single-child' | 'root-length' | 'blank-in-label' | 'not-in-translate' | 'unrooted';

type First = { count: number; readonly at: number; readonly tree: number; readonly name: string };
type Wording = { readonly level: RemarkLevel; readonly sentence: (count: number, place: string, name: string) => string };

const WORDINGS: Readonly<Record<ReadingCode, Wording>> = {
	'missing-length': {
		level: 'settle',
		sentence: (count, place, name) =>
			`${counted(count, 'branch has', 'branches have')} no length, the first at ${place}${quoted(name)}. ` +
			'Ages of common ancestors need every length: bring the dated tree.'
	},
	'missing-semicolon': {
		level: 'look',
		sentence: (count, place) =>
			`${counted(count, 'tree does', 'trees do')} not end with ";", the first at ${place}. Check that the text is complete.`
	},
	'single-child': {
		level: 'information',
		sentence: (count, place, name) =>
			`${counted(count, 'node has', 'nodes have')} a single child, the first at ${place}${quoted(name)}. They are kept and change no age.`
	},
	'root-length': {
		level: 'information',
		sentence: (count, place) =>
			`${counted(count, 'tree has', 'trees have')} a branch above the root, the first at ${place}. It is left out of every age.`
	},
	'blank-in-label': {
		level: 'look',
		sentence: (count, place, name) =>
			`${counted(count, 'unquoted label holds', 'unquoted labels hold')} a blank, the first at ${place}${quoted(name)}. ` +
			'The words are read as one label; check that no comma is missing.'
	},
	'not-in-translate': {
		level: 'look',
		sentence: (count, place, name) =>
			`${counted(count, 'tip name is', 'tip names are')} not in the TRANSLATE table, the first at ${place}${quoted(name)}. ` +
			'They are kept as they stand.'
	},
	unrooted: {
		level: 'look',
		sentence: (count, place, name) =>
			`The file calls ${counted(count, 'tree', 'trees')} unrooted, the first at ${place}${quoted(name)}. ` +
			'Read as rooted where the outermost bracket stands; check that this is the root.'
	}
};

/** Counts what was noticed while reading, with the first place of each, so that 10,000 trees give one sentence, not 10,000. */
export class ReadingNotes {
	private readonly firsts = new Map<ReadingCode, First>();

	add(code: ReadingCode, at: number, tree: number, name = ''): void {
		const first = this.firsts.get(code);
		if (first === undefined) this.firsts.set(code, { count: 1, at, tree, name });
		else first.count += 1;
	}

	/** One remark per kind; `where.tree` counts from 0. */
	remarks(text: string): Remark[] {
		return [...this.firsts].map(([code, { count, at, tree, name }]) => {
			const place = placeAt(text, at);
			const { level, sentence } = WORDINGS[code];
			const where = name === '' ? { ...place, tree } : { ...place, tree, name };
			return remark(level, code, sentence(count, placeInWords(place), name), where);
		});
	}
}

function counted(count: number, one: string, many: string): string {
	return `${count.toLocaleString('en')} ${count === 1 ? one : many}`;
}

function quoted(name: string): string {
	return name === '' ? '' : ` ("${name}")`;
}
