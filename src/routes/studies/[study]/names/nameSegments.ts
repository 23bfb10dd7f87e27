import type { CharRange } from '#lib/analysis/names/spelling.ts';

export type Segment = { readonly text: string; readonly differs: boolean };

/** A name cut into stretches that are shared and stretches that differ. */
export function nameSegments(name: string, differing: readonly CharRange[]): Segment[] {
	const segments: Segment[] = [];
	let at = 0;
	for (const [start, end] of differing) {
		if (start > at) segments.push({ text: name.slice(at, start), differs: false });
		segments.push({ text: name.slice(start, end), differs: true });
		at = end;
	}
	if (at < name.length) segments.push({ text: name.slice(at), differs: false });
	return segments;
}
