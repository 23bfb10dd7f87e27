import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import Plate from './Plate.svelte';
import { microPlate } from './microPlate.fixture.ts';

function plate() {
	const onpin = vi.fn();
	render(Plate, { props: { result: microPlate(), initialWidth: 900, onpin } });
	const [tree, wing, pairs] = ['Tree.', 'Overlap of every pair.', 'Overlap against age.'].map((name) =>
		screen.getByRole('button', { name: new RegExp(`^${name}`) })
	);
	if (!tree || !wing || !pairs) throw new Error('Expected three stops.');
	const note = () => document.querySelector('[aria-live="polite"]')?.textContent ?? '';
	return { tree, wing, pairs, note, onpin };
}

afterEach(cleanup);

describe('Plate', () => {
	it('speaks a sentence in place of the picture', () => {
		plate();
		expect(screen.getByRole('img').getAttribute('aria-label')).toContain('4 species and 6 pairs');
	});

	it('moves through the tree by arrow keys and tells where it is', async () => {
		const { tree, note } = plate();
		await fireEvent.keyDown(tree, { key: 'Home' });
		expect(note()).toContain('A–D');
		await fireEvent.keyDown(tree, { key: 'ArrowLeft' });
		expect(note()).toContain('A–C');
		await fireEvent.keyDown(tree, { key: 'ArrowRight' });
		expect(note()).toContain('A–D');
	});

	it('moves through the pairs of the wing', async () => {
		const { wing, note } = plate();
		await fireEvent.keyDown(wing, { key: 'ArrowDown' });
		expect(note()).toContain('A and B');
		await fireEvent.keyDown(wing, { key: 'ArrowDown' });
		expect(note()).toContain('B and C');
	});

	it('is drawn wide on paper however narrow the screen, and as before afterwards', async () => {
		render(Plate, { props: { result: microPlate(), initialWidth: 360 } });
		const width = () => screen.getByRole('img').getAttribute('viewBox')?.split(' ')[2];
		expect(width()).toBe('360');
		await fireEvent(window, new Event('beforeprint'));
		expect(width()).toBe('920'); // the least width on paper; below 552 it would be stacked
		await fireEvent(window, new Event('afterprint'));
		expect(width()).toBe('360');
	});

	it('pins by Enter, compares a second, and frees both by Escape', async () => {
		const { tree, note, onpin } = plate();
		await fireEvent.keyDown(tree, { key: 'Home' });
		await fireEvent.keyDown(tree, { key: 'Enter' });
		expect(onpin).toHaveBeenCalledWith({ focus: { kind: 'node', node: 0 }, node: 0 });
		await fireEvent.keyDown(tree, { key: 'ArrowLeft' });
		expect(note()).toContain('A–D');
		expect(note()).toContain('A–C');
		await fireEvent.keyDown(tree, { key: 'Escape' });
		expect(note().trim()).toBe('');
	});
});
