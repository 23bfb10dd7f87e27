import type { Page } from '@playwright/test';

/** Pastes as a person does: the whole text at once, from the clipboard. */
export async function paste(page: Page, text: string): Promise<void> {
	const field = page.getByLabel('Paste or drop anything');
	await field.focus();
	await field.evaluate((element, pasted) => {
		const clipboardData = new DataTransfer();
		clipboardData.setData('text/plain', pasted);
		element.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
	}, text);
}
