import { writePairList } from '#lib/overlap/writeMatrix.ts';
import { download } from '../download.server.ts';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = (event) => download(event, { file: 'pairs.csv', write: writePairList });
