import { join } from 'node:path';
import { projectRoot } from '../folders.ts';

export const EXPORT_FONTS = ['Arimo-Regular.ttf', 'Arimo-Italic.ttf', 'Arimo-Bold.ttf', 'Arimo-BoldItalic.ttf'] as const;

/** Where an export font lies. */
export function exportFont(name: (typeof EXPORT_FONTS)[number]): string {
	return join(projectRoot(), 'static', 'fonts', 'export', name);
}
