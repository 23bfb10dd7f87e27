/** Frozen output: it detects change and proves nothing. Look at the picture before accepting a new one. */
import { expect, it } from 'vitest';
import { microPlate } from '#lib/figures/microPlate.fixture.ts';
import { renderPlateSvg } from './plateSvg.ts';

it('draws the plate of four species as it did before', async () => {
	await expect(renderPlateSvg(microPlate(), { measureName: 'Schoener\u2019s D' })).toMatchFileSnapshot('plateSvg.frozen.svg');
});
