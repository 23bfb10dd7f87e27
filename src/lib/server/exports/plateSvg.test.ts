import { describe, expect, it } from 'vitest';
import { ladderPlate, microPlate } from '#lib/figures/microPlate.fixture.ts';
import { renderPlatePdf } from './platePdf.ts';
import { drawPlate, renderPlateSvg } from './plateSvg.ts';

const AWKWARD = ['Rana <b>', 'Rana "q" & o\u2019d', 'Rana caf\u00e9', 'Rana </text><script>'];

describe('renderPlateSvg', () => {
	const svg = renderPlateSvg(microPlate(), { measureName: 'Schoener\u2019s D' });

	it('is one drawing with its size in millimetres', () => {
		expect(svg).toMatch(/^<svg [^>]*width="174mm" height="[\d.]+mm"/);
		expect(svg.match(/<svg/g)).toHaveLength(1);
	});

	it('holds live text, no class, no comment and no token of the page', () => {
		expect(svg).toContain('Arial, Helvetica, Arimo, sans-serif');
		expect(svg).not.toMatch(/class=|<!--|var\(/);
		for (const letter of ['a', 'b', 'c', 'd', 'e']) expect(svg).toContain(`>${letter}</text>`);
	});

	it('escapes whatever stands in a species name', () => {
		const text = renderPlateSvg(microPlate(AWKWARD), { abbreviateGenus: false });
		expect(text).not.toMatch(/<script|<b>/);
		expect(text).toContain('Rana &lt;b');
		expect(text).toContain('Rana caf\u00e9');
	});

	it('turns the whole plate round', () => {
		const place = (text: string, letter: string) =>
			Number(new RegExp(`<text x="([\\d.]+)"[^>]*>${letter}</text>`).exec(text)?.[1]);
		const turned = renderPlateSvg(microPlate(), { ageDirection: 'present-right' });
		expect(place(svg, 'a')).toBeLessThan(place(svg, 'b'));
		expect(place(turned, 'a')).toBeGreaterThan(place(turned, 'b'));
	});

	it('refuses a width, a resolution or a type size no figure has', () => {
		expect(() => renderPlateSvg(microPlate(), { widthMm: 20 })).toThrow('Expected widthMm between 30 and 300; got 20.');
		expect(() => renderPlateSvg(microPlate(), { typeSizePt: 5 })).toThrow('typeSizePt');
		expect(() => renderPlateSvg(microPlate(), { dpi: Number.NaN })).toThrow('dpi');
	});

	it('draws even the narrowest figure without a negative size', () => {
		expect(renderPlateSvg(microPlate(), { widthMm: 30 })).not.toMatch(/width="-|NaN/);
		expect(renderPlateSvg(microPlate(), { widthMm: 84, typeSizePt: 14 })).not.toMatch(/width="-|NaN/);
	});

	// 6 pt is the least that journals print; by property for every size of tree from values in cells to spans.
	it('prints no lettering under 6 pt', () => {
		for (const count of [4, 12, 26, 60, 80, 100, 200]) {
			const { svg: drawn, widthPt } = drawPlate(ladderPlate(count), {}, 'pt');
			const units = Number(/viewBox="0 0 ([\d.]+) /.exec(drawn)?.[1]);
			const sizes = [...drawn.matchAll(/font-size="([\d.]+)"/g)].map(([, size]) => (Number(size) * widthPt) / units);
			expect(Math.min(...sizes), `${count} species`).toBeGreaterThanOrEqual(5.99);
		}
	});

	it('keeps the width that was asked in every direction and palette', () => {
		for (const widthMm of [30, 84, 129, 300])
			expect(drawPlate(microPlate(), { widthMm, palette: 'viridis' }, 'pt').widthPt).toBeCloseTo((widthMm * 72) / 25.4, 9);
	});
});

describe('renderPlatePdf', () => {
	it('is a page of the asked width with its fonts inside', async () => {
		const pdf = await renderPlatePdf(microPlate(AWKWARD), { widthMm: 127 });
		expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
		expect(pdf.toString('latin1')).toMatch(/MediaBox \[0 0 360 /); // 127 mm are 5 inches, 360 points
		expect(pdf.toString('latin1')).toContain('Arimo');
		expect(pdf.toString('latin1')).toContain('FontFile2');
	});
});
