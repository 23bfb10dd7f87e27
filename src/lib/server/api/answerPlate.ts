import type { z } from 'zod';
import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { plateQuerySchema } from '#lib/contracts/answers.ts';
import { drawnAverage } from '#lib/contracts/drawnPlate.ts';
import { MEASURE_NAMES } from '#lib/contracts/measure.ts';
import type { FigureSettings as SavedSettings } from '#lib/contracts/report.ts';
import type { Access } from '#lib/server/access.ts';
import type { FigureSettings } from '#lib/server/exports/figureSettings.ts';
import { renderPlatePdf } from '#lib/server/exports/platePdf.ts';
import { renderPlatePng } from '#lib/server/exports/platePng.ts';
import { renderPlateSvg } from '#lib/server/exports/plateSvg.ts';
import { attachment } from './csv.ts';
import type { FinishedAnalysis } from './finished.ts';
import { NOT_FOUND } from './answering.ts';
import { noteExport } from './noteExport.ts';
import { Refusal } from './refusal.ts';

type Render = (result: AnalysisResult, settings: Partial<FigureSettings>) => string | Uint8Array | Promise<Uint8Array>;
type Kind = { readonly type: string; readonly render: Render };

const KINDS: ReadonlyMap<string, Kind> = new Map([
	['svg', { type: 'image/svg+xml', render: renderPlateSvg }],
	['pdf', { type: 'application/pdf', render: renderPlatePdf }],
	['png', { type: 'image/png', render: renderPlatePng }]
]);

type Query = z.infer<typeof plateQuerySchema>;
type Asked = { readonly format: string; readonly settings: Query };

export async function answerPlate(
	access: Access,
	{ id, result }: FinishedAnalysis,
	{ format, settings }: Asked
): Promise<Response> {
	const kind = KINDS.get(format);
	if (kind === undefined) throw new Refusal(404, 'not-found', NOT_FOUND);
	const { width, dpi, age, palette, type } = settings;
	const drawn = await kind.render(result, plateSettings(result, { widthMm: width, dpi, age, palette, typeSizePt: type }));
	const file = `plate.${format}`;
	await noteExport(access, { analysis: id, file });
	return fileResponse(drawn, { type: kind.type, file });
}

type Chosen = { readonly [Key in keyof SavedSettings]?: SavedSettings[Key] | undefined };

/** What a person chose, and what the result itself says of its measure and its unit. */
export function plateSettings(
	result: AnalysisResult,
	{ widthMm, dpi, age, palette, typeSizePt }: Chosen
): Partial<FigureSettings> {
	return {
		measureName: MEASURE_NAMES[result.compared.measure],
		ageUnit: result.compared.ageUnit,
		average: drawnAverage(result),
		...(widthMm === undefined ? {} : { widthMm }),
		...(dpi === undefined ? {} : { dpi }),
		...(age === undefined ? {} : { ageDirection: age === 'left' ? 'present-left' : 'present-right' }),
		...(palette === undefined ? {} : { palette }),
		...(typeSizePt === undefined ? {} : { typeSizePt })
	};
}

type FileFacts = { readonly type: string; readonly file: string };

export function fileResponse(content: string | Uint8Array, { type, file }: FileFacts): Response {
	const body = typeof content === 'string' ? content : new Uint8Array(content);
	return new Response(body, {
		headers: {
			'content-type': type,
			'content-disposition': attachment(file),
			'cache-control': 'private, no-store',
			// A drawing opened by itself runs nothing, whatever a name in it may say.
			'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox",
			'x-content-type-options': 'nosniff'
		}
	});
}
