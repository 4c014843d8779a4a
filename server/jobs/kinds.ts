/** What each kind of work in the queue does. */
import type { BackgroundJobKind } from '../../shared/schemas/background-job.ts';
import type { AppContext } from '../context.ts';
import { makeDossier } from '../services/dossier/make-dossier.ts';
import type { Work } from './worker.ts';

export const workOf = (context: AppContext): Readonly<Record<BackgroundJobKind, Work>> => ({
  dossier: (order) => makeDossier(context, order),
});
