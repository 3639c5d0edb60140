/**
 * How many operations of all sheets on this phone wait to be sent, read without making a database where
 * there is none. A database that can't be read counts as one that waits.
 */
export async function countWaiting(name = 'tercet'): Promise<number> {
  if (typeof indexedDB === 'undefined') return 0;
  if ('databases' in indexedDB && !(await indexedDB.databases()).some((database) => database.name === name)) return 0;
  return new Promise((resolve) => {
    const request = indexedDB.open(name);
    request.onerror = () => resolve(1);
    request.onupgradeneeded = () => request.transaction?.abort();
    request.onsuccess = () => {
      const db = request.result;
      const stores = ['outbox', 'pulls'].filter((store) => db.objectStoreNames.contains(store));
      if (stores.length === 0) {
        db.close();
        return resolve(0);
      }
      const transaction = db.transaction(stores);
      let waiting = 0;
      for (const store of stores) {
        const rows = transaction.objectStore(store).getAll();
        rows.onsuccess = () => (waiting += (rows.result as { state: string }[]).filter((row) => row.state === 'waiting').length);
      }
      transaction.oncomplete = () => {
        db.close();
        resolve(waiting);
      };
      transaction.onerror = () => resolve(1);
    };
  });
}
