import { describe, expect, it } from 'vitest';
import { microPlate } from '#lib/figures/microPlate.fixture.ts';
import { renderPlateSvg } from './plateSvg.ts';
import { rasterise } from './rasterise.ts';

describe('rasterise', () => {
	const svg = renderPlateSvg(microPlate(), { widthMm: 84 });

	// 300 dpi are 300 / 0.0254 = 11,811 pixels per metre.
	it('has the pixels of its width and says its resolution', () => {
		const png = rasterise({ svg, widthPx: 992, dpi: 300 });
		expect(png.subarray(0, 8)).toEqual(Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]));
		expect(png.readUInt32BE(16)).toBe(992);
		const place = png.indexOf('pHYs');
		expect([png.readUInt32BE(place + 4), png.readUInt32BE(place + 8), png[place + 12]]).toEqual([11811, 11811, 1]);
	});

	// With a font that is not found the letters are left out, and the picture compresses to less.
	it('draws the letters with the fonts that are shipped', () => {
		const mute = svg.replaceAll(/<text[^>]*>[^<]*(<tspan[^>]*>[^<]*<\/tspan>[^<]*)*<\/text>/g, '');
		const size = (drawing: string) => rasterise({ svg: drawing, widthPx: 992, dpi: 300 }).length;
		expect(size(svg)).toBeGreaterThan(1.1 * size(mute));
	});
});
