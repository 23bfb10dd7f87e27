import { describe, expect, it } from 'vitest';
import { microResult } from '../microResult.fixture.ts';
import { writeCaption } from './caption.ts';

describe('writeCaption', () => {
	it('names every panel and the numbers a reader judges by', () => {
		const caption = writeCaption(microResult());
		for (const panel of ['(a)', '(b)', '(c)', '(d)', '(e)']) expect(caption).toContain(panel);
		// By hand from the worked example: slope −31/265, two of 24 relabellings, two of six within the deepest split.
		expect(caption).toContain('Slope −0.117 per Myr, r = −0.95; p = 0.083 (one-sided, falls; all 24 relabellings).');
		expect(caption).toContain('Within the deepest split p = 0.33.');
		expect(caption).toContain('4 species, 6 pairs, 3 nodes.');
	});

	// The limits are those of the drawing: dots up to 12 pairs, all means up to 60 nodes, the 20 with most pairs above.
	it('says of the panels what is truly drawn', () => {
		const result = microResult();
		const caption = writeCaption(result);
		expect(caption).toContain('one column of pairs under each node; diamonds, means across a node (weighted by branching);');
		expect(caption).toContain('(e) Where the lines of all 24 relabellings end at the root');

		const [node] = result.nodeAverages.nodes;
		if (!node) throw new Error('Expected a node.');
		const nodes = Array.from({ length: 61 }, (_, index) => ({ ...node, node: index, pairs: 13 }));
		const large = writeCaption({ ...result, nodeAverages: { ...result.nodeAverages, nodes } });
		expect(large).toContain('(strips: width by the square root of the number of pairs)');
		expect(large).toContain('means across the 20 nodes with most pairs (weighted by branching)');
	});

	it('names the means that were tested', () => {
		expect(writeCaption(microResult({ statistic: 'nodes-plain' }))).toContain('means across a node (every pair equal)');
	});

	it('says who was left out and what was done to the tips', () => {
		const result = microResult();
		const caption = writeCaption({
			...result,
			dropped: [{ name: 'L. sericea', in: 'data', why: 'no tip of this name' }],
			compared: { ...result.compared, levelled: true, polytomies: 2, transform: 'logit' }
		});
		expect(caption).toContain('Left out: L. sericea.');
		expect(caption).toContain('Unresolved nodes: 2.');
		expect(caption).toContain('Tips were levelled by extending terminal branches.');
		expect(caption).toContain('Overlap on the logit scale.');
	});

	it('tells what the marks of clades are, where some hold', () => {
		const result = microResult({ clades: { minTips: 3 } });
		expect(writeCaption(result)).not.toContain('Brackets');
		const clades = result.clades?.map((row) => ({ ...row, holds: true }));
		expect(writeCaption({ ...result, clades })).toContain(
			'Brackets on the tree and outlines on the wing: clades more alike inside'
		);
	});
});
