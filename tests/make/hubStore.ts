import { type HubStore, makeHubStore } from '#server/services/hubStore';
import { type HubHouse, makeHubHouse } from '#tests/make/hub';

/** A hub house whose store is the real one, but for some things that it does differently. */
export async function houseWithStore(
  change: (real: () => HubStore) => Partial<HubStore>,
): Promise<{ house: HubHouse; real: () => HubStore }> {
  let store: HubStore | null = null;
  let house: HubHouse | null = null;
  const real = (): HubStore => {
    if (!house) throw new Error('The house is not there yet.');
    store ??= makeHubStore(house.db, house.databaseUrl);
    return store;
  };
  house = await makeHubHouse({
    store: {
      open: (...facts) => real().open(...facts),
      append: (rows) => real().append(rows),
      snapshot: (state) => real().snapshot(state),
      drawn: (rows) => real().drawn(rows),
      seen: (...facts) => real().seen(...facts),
      close: () => real().close(),
      ...change(real),
    },
  });
  return { house, real };
}
