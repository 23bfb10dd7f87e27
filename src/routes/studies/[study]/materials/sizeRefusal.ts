import { recogniseText } from './recogniseText.ts';

const MIB = 1024 * 1024;
/** As the server counts them: bytes of the text. */
const MOST_MIB = { trees: 64, matrix: 96 } as const;

/**
 * The sentence that turns a text down for its size before anything is sent; null within the limit.
 * @param start - the first few thousand signs, which tell trees from tables
 */
export function sizeRefusal(bytes: number, start: string): string | null {
	const kind = recogniseText(start) === 'trees' ? 'trees' : 'matrix';
	const most = MOST_MIB[kind];
	if (bytes <= most * MIB) return null;
	const found = (bytes / MIB).toLocaleString('en', { maximumFractionDigits: 1 });
	const way = kind === 'trees' ? 'Thin the sample, and bring every tenth tree.' : 'Leave species out, or round the values.';
	return `Expected ${kind === 'trees' ? 'a tree text' : 'a matrix'} of at most ${most} MiB; this one has ${found} MiB. ${way} Nothing was sent.`;
}
