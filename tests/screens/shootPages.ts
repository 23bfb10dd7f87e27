/**
 * `npm run screens [FOLDER] [WORD]`: a picture of every page of the example at 1440 and 390 px, light and dark, into a folder
 * (default ./screens). WORD keeps the pages whose name holds it. Needs a finished build.
 */
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type Page } from '@playwright/test';
import { browserLaunch } from '../support/browserLaunch.ts';
import { scrollThrough } from '../support/scrollThrough.ts';
import { findPages } from './findPages.ts';

const PORT = 4320;
const ADDRESS = `http://127.0.0.1:${PORT}`;
const START_MS = 120_000;
const WIDTHS = [1440, 390] as const;
const THEMES = ['light', 'dark'] as const;

const [folder = 'screens', word = ''] = process.argv.slice(2);
const data = join(folder, 'data');

async function startDemo(): Promise<ChildProcess> {
	rmSync(data, { recursive: true, force: true });
	const server = spawn('node', ['build/commands/demo.mjs'], {
		env: { ...process.env, PORT: String(PORT), HOST: '127.0.0.1', KITHLINE_DATA: data },
		stdio: ['ignore', 'ignore', 'inherit']
	});
	const deadline = Date.now() + START_MS;
	while (Date.now() < deadline) {
		const answer = await fetch(`${ADDRESS}/health`).catch(() => null);
		if (answer?.ok) return server;
		await new Promise((resolve) => setTimeout(resolve, 300));
	}
	server.kill('SIGTERM');
	throw new Error('The demo did not answer. Is there a build? Run: npm run build');
}

async function signIn(page: Page): Promise<void> {
	await page.goto(`${ADDRESS}/sign-in`);
	await page.fill('input[name=email]', 'lead@demo.example');
	await page.fill('input[name=passphrase]', 'lanterns over the merrow');
	await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL(`${ADDRESS}/studies`);
}

async function shoot(browser: Browser, pages: Awaited<ReturnType<typeof findPages>>): Promise<void> {
	for (const theme of THEMES) {
		for (const width of WIDTHS) {
			for (const signedIn of [false, true]) {
				const context = await browser.newContext({
					colorScheme: theme,
					viewport: { width, height: 900 },
					reducedMotion: 'reduce'
				});
				const page = await context.newPage();
				if (signedIn) await signIn(page);
				for (const { name, path } of pages.filter((one) => one.signedIn === signedIn && one.name.includes(word))) {
					await page.goto(ADDRESS + path, { waitUntil: 'networkidle' });
					await scrollThrough(page);
					await page.screenshot({ path: join(folder, `${name}-${width}-${theme}.png`), fullPage: true });
				}
				await context.close();
			}
		}
	}
}

mkdirSync(folder, { recursive: true });
const server = await startDemo();
const browser = await chromium.launch(browserLaunch);
try {
	const page = await browser.newPage();
	await signIn(page);
	await shoot(browser, await findPages(page, ADDRESS));
	process.stdout.write(`Pictures are in ${folder}/\n`);
} finally {
	await browser.close();
	server.kill('SIGTERM');
}
