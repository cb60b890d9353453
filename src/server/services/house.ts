import type { HouseInput } from '#contracts/house';
import type { App } from '#server/app';
import { houses } from '#server/db/schema/index';
import type { Viewer } from './viewer.ts';

/** Writes the member's own house; later marks on the stairs keep the measures they were made on. */
export async function saveHouse(app: App, viewer: Viewer, input: HouseInput): Promise<void> {
  const values = { ...input, updatedAt: app.clock.now() };
  await app.db
    .insert(houses)
    .values({ memberId: viewer.id, ...values })
    .onConflictDoUpdate({ target: houses.memberId, set: values });
}
