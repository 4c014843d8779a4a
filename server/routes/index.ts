/** Every route of the API. What is not here is not answered. */
import { documentRoutes } from './documents.ts';
import { dossierRoutes } from './dossiers.ts';
import { bookCheckRoutes } from './book-check.ts';
import { eventRoutes } from './events.ts';
import { healthRoutes } from './health.ts';
import { lotAndVoucherRoutes } from './lots-and-vouchers.ts';
import { metalRequestRoutes } from './metal-requests.ts';
import { peopleRoutes } from './people.ts';
import { registerRoutes } from './registers.ts';
import { reportRoutes } from './reports.ts';
import type { Route } from './route.ts';
import { secondFactorRoutes } from './second-factor.ts';
import { sessionRoutes } from './session.ts';
import { signatureRoutes } from './signatures.ts';
import { statementRoutes } from './statements.ts';
import { todayRoutes } from './today.ts';

export const routes: readonly Route[] = [
  ...healthRoutes,
  ...sessionRoutes,
  ...secondFactorRoutes,
  ...peopleRoutes,
  ...eventRoutes,
  ...signatureRoutes,
  ...metalRequestRoutes,
  ...registerRoutes,
  ...lotAndVoucherRoutes,
  ...todayRoutes,
  ...reportRoutes,
  ...statementRoutes,
  ...bookCheckRoutes,
  ...documentRoutes,
  ...dossierRoutes,
];
