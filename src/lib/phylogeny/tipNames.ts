import { labelShown } from './label.ts';

/** A label as spelt and as shown. */
export type TipName = { readonly labelRaw: string; readonly label: string };

/** A tip name with the tree and the offset where it was last met; the reader of the trees keeps those two up to date. */
export type KnownName = TipName & { readonly lastMet: { tree: number; at: number } };

/**
 * The tip names of one text. Each spelling is resolved once and shared by all trees, and remembers where it was last met,
 * so that a name standing twice in one tree is found without a set per tree. Two spellings of one label share the memory.
 */
export class TipNames {
	private readonly bySpelling = new Map<string, KnownName>();
	private readonly lastMetByLabel = new Map<string, KnownName['lastMet']>();
	private readonly resolve: (spelling: string, at: number) => TipName;

	constructor(resolve: (spelling: string, at: number) => TipName) {
		this.resolve = resolve;
	}

	get(spelling: string, at: number): KnownName {
		return this.bySpelling.get(spelling) ?? this.learn(spelling, at);
	}

	private learn(spelling: string, at: number): KnownName {
		const { label, labelRaw } = this.resolve(spelling, at);
		const lastMet = this.lastMetByLabel.get(label) ?? { tree: -1, at: -1 };
		const known = { label, labelRaw, lastMet };
		this.lastMetByLabel.set(label, lastMet);
		this.bySpelling.set(spelling, known);
		return known;
	}
}

/** A tip called what its spelling says, with no table to look it up in. */
export function spelledName(spelling: string): TipName {
	return { labelRaw: spelling, label: labelShown(spelling) };
}
