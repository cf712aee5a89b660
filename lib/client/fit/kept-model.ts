/** A model that waits in this browser while its owner signs in; nothing of it is sent. */
export interface KeptModel {
  readonly file: File;
  readonly mmPerUnit: number;
}

type Row = KeptModel & { readonly tab: string; readonly at: number };

const [baseName, storeName, tabKey] = ["fanfold-fit", "kept-model", "fanfold-fit-tab"];
/** Longer than signing in takes; what was left behind is forgotten. */
const keptForMs = 3_600_000;

function open(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const asked = indexedDB.open(baseName, 1);
    asked.onupgradeneeded = () => void asked.result.createObjectStore(storeName, { keyPath: "tab" });
    asked.onsuccess = () => resolve(asked.result);
    asked.onerror = () => reject(asked.error ?? new Error("This browser keeps nothing."));
  });
}

async function within(work: (store: IDBObjectStore) => void): Promise<void> {
  const base = await open();
  try {
    await new Promise<void>((resolve, reject) => {
      const doing = base.transaction(storeName, "readwrite");
      doing.oncomplete = () => resolve();
      doing.onabort = () => reject(doing.error ?? new Error("There is no room to keep the model."));
      work(doing.objectStore(storeName));
    });
  } finally {
    base.close();
  }
}

/** Keeps a model for this tab, so that it is there again after a page of the same site. @throws when there is no room */
export async function keepModel(model: KeptModel): Promise<void> {
  const tab = Array.from(crypto.getRandomValues(new Uint32Array(4)), (part) => part.toString(36)).join("-");
  sessionStorage.setItem(tabKey, tab);
  const row: Row = { ...model, tab, at: Date.now() };
  await within((store) => void store.put(row));
}

/** The model that this tab keeps, until it is forgotten; what other tabs left behind an hour ago goes. */
export async function keptModel(): Promise<KeptModel | undefined> {
  const tab = sessionStorage.getItem(tabKey);
  if (tab === null) return undefined;
  let found: Row | undefined;
  await within((store) => {
    const all = store.getAll();
    all.onsuccess = () => {
      for (const row of all.result as Row[]) {
        if (row.tab === tab) found = row;
        else if (Date.now() - row.at > keptForMs) store.delete(row.tab);
      }
    };
  });
  return found && { file: found.file, mmPerUnit: found.mmPerUnit };
}

/** Forgets it: the model was carried on, put away, or another one is looked at. */
export async function forgetKeptModel(): Promise<void> {
  const tab = sessionStorage.getItem(tabKey);
  if (tab === null) return;
  sessionStorage.removeItem(tabKey);
  await within((store) => void store.delete(tab));
}
