import { readHealth, readReadiness } from '#shared/schemas/health.ts';
import { AppError } from '#shared/errors/AppError.ts';
import { handlePublic, type Route } from '#server/middlewares/handle.ts';
import { migrationsAreCurrent } from '#server/models/migrations.ts';
import { database } from '#server/models/database.ts';
import type { Services } from './services.ts';

export const healthRoutes = ({ solverIsReady }: Services): readonly Route[] => [
  handlePublic(readHealth, () => ({ status: 'up' as const })),
  handlePublic(readReadiness, async () => {
    const isReachable = await database()
      .authenticate()
      .then(
        () => true,
        () => false,
      );
    const parts = {
      database: isReachable,
      migrations: isReachable && (await migrationsAreCurrent()),
      solver: solverIsReady(),
    };
    const missing = Object.entries(parts).filter(([, ready]) => !ready);
    if (missing.length > 0) {
      const names = missing.map(([name]) => name).join(', ');
      throw new AppError('unavailable', `Not ready yet: ${names}.`, parts);
    }
    return parts;
  }),
];
