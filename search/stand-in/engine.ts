import { ServiceError, indexNotFound } from "./errors";
import { KeyRing } from "./keys";
import type { Document } from "./paths";
import { SearchIndex } from "./search-index";
import type { EnqueuedTask } from "./tasks";
import { TaskQueue } from "./tasks";
import { parseFilter } from "./filter-parse";
import { runFilter } from "./filter-run";
import { writeDocuments } from "./write-documents";

export type Swap = { indexes: [string, string]; rename: boolean };

/** All that the server holds: indexes, tasks, keys and the one experimental feature it knows. */
export class Engine {
  readonly indexes = new Map<string, SearchIndex>();
  readonly keys: KeyRing;
  readonly tasks = new TaskQueue(() => {
    for (const index of this.indexes.values()) index.prepare();
  });
  containsFilter = false;

  constructor(masterKey: string) {
    this.keys = new KeyRing(masterKey);
  }

  index(uid: string): SearchIndex {
    const index = this.indexes.get(uid);
    if (index === undefined) throw indexNotFound(uid);
    return index;
  }

  createIndex(uid: string, primaryKey: string | null): EnqueuedTask {
    return this.tasks.enqueue("indexCreation", uid, { primaryKey }, () => {
      if (this.indexes.has(uid)) throw new ServiceError("index_already_exists", `Index \`${uid}\` already exists.`);
      this.indexes.set(uid, new SearchIndex(uid, primaryKey, new Date().toISOString()));
    });
  }

  updateIndex(uid: string, change: { primaryKey?: string | null; uid?: string }): EnqueuedTask {
    const details = {
      primaryKey: change.primaryKey ?? null,
      ...(change.uid === undefined ? {} : { oldIndexUid: uid, newIndexUid: change.uid }),
    };
    return this.tasks.enqueue("indexUpdate", uid, details, () => {
      const index = this.index(uid);
      const { primaryKey, uid: newUid } = change;
      if (typeof primaryKey === "string" && primaryKey !== index.primaryKey) {
        if (index.primaryKey !== null && index.count > 0) {
          throw new ServiceError(
            "index_primary_key_already_exists",
            `Index \`${uid}\`: Index already has a primary key: \`${index.primaryKey}\`.`,
          );
        }
        index.primaryKey = primaryKey;
      }
      if (newUid !== undefined && newUid !== uid) {
        if (this.indexes.has(newUid))
          throw new ServiceError("index_already_exists", `Index \`${newUid}\` already exists.`);
        this.move(new Map([[uid, newUid]]));
      }
      touch(index);
    });
  }

  deleteIndex(uid: string): EnqueuedTask {
    return this.tasks.enqueue("indexDeletion", uid, { deletedDocuments: null }, (task) => {
      const index = this.index(uid);
      task.details = { deletedDocuments: index.count };
      this.indexes.delete(uid);
    });
  }

  /** Exchanges or renames indexes in one task; nothing happens when any of them is not as it must be. */
  swapIndexes(swaps: Swap[]): EnqueuedTask {
    return this.tasks.enqueue("indexSwap", null, { swaps }, () => {
      const missing = swaps
        .flatMap(({ indexes, rename }) => (rename ? [indexes[0]] : indexes))
        .filter((uid) => !this.indexes.has(uid));
      if (missing.length > 0) {
        const [first = ""] = missing;
        if (missing.length === 1) throw indexNotFound(first);
        const list = missing.map((uid) => `\`${uid}\``).join(", ");
        throw new ServiceError("index_not_found", `Indexes ${list} not found.`);
      }
      const taken = swaps.find(({ indexes, rename }) => rename && this.indexes.has(indexes[1]));
      if (taken !== undefined) {
        throw new ServiceError("index_already_exists", `Index \`${taken.indexes[1]}\` already exists.`);
      }
      const names = new Map<string, string>();
      for (const { indexes, rename } of swaps) {
        names.set(indexes[0], indexes[1]);
        if (!rename) names.set(indexes[1], indexes[0]);
      }
      this.move(names);
    });
  }

  addDocuments(uid: string, documents: Document[], mode: "replace" | "merge", primaryKey: string | null): EnqueuedTask {
    const details = { receivedDocuments: documents.length, indexedDocuments: null };
    return this.tasks.enqueue("documentAdditionOrUpdate", uid, details, (task) => {
      task.details = { receivedDocuments: documents.length, indexedDocuments: 0 };
      const index = this.indexes.get(uid) ?? new SearchIndex(uid, primaryKey, new Date().toISOString());
      this.indexes.set(uid, index);
      writeDocuments(index, documents, mode, primaryKey);
      touch(index);
      task.details = { receivedDocuments: documents.length, indexedDocuments: documents.length };
    });
  }

  deleteDocuments(uid: string, ids: string[] | "all"): EnqueuedTask {
    const providedIds = ids === "all" ? 0 : ids.length;
    const details = { providedIds, deletedDocuments: null, originalFilter: null };
    return this.tasks.enqueue("documentDeletion", uid, details, (task) => {
      task.details = { ...details, deletedDocuments: 0 };
      const index = this.index(uid);
      const before = index.count;
      if (ids === "all") index.clear();
      else for (const id of ids) index.remove(id);
      touch(index);
      task.details = { ...details, deletedDocuments: before - index.count };
    });
  }

  deleteByFilter(uid: string, filter: unknown): EnqueuedTask {
    const details = { providedIds: 0, deletedDocuments: null, originalFilter: JSON.stringify(filter) };
    return this.tasks.enqueue("documentDeletion", uid, details, (task) => {
      task.details = { ...details, deletedDocuments: 0 };
      const index = this.index(uid);
      const code = "invalid_document_filter";
      const parsed = parseFilter(filter, code);
      if (parsed === undefined) throw new ServiceError(code, "Sending an empty filter is forbidden.");
      const mask = this.filterOrPrefix(index, () => runFilter(parsed, index.filterContext(code, this.containsFilter)));
      const before = index.count;
      for (const [id, slot] of index.entries()) if (mask[slot] === 1) index.remove(id);
      touch(index);
      task.details = { ...details, deletedDocuments: before - index.count };
    });
  }

  changeSettings(uid: string, change: Record<string, unknown>, mayCreate: boolean): EnqueuedTask {
    return this.tasks.enqueue("settingsUpdate", uid, change, () => {
      if (mayCreate && !this.indexes.has(uid)) {
        this.indexes.set(uid, new SearchIndex(uid, null, new Date().toISOString()));
      }
      const index = this.index(uid);
      index.changeSettings(change);
      touch(index);
    });
  }

  private filterOrPrefix<T>(index: SearchIndex, run: () => T): T {
    try {
      return run();
    } catch (error) {
      throw error instanceof ServiceError ? error.prefixed(`Index \`${index.uid}\`: `) : error;
    }
  }

  private move(names: ReadonlyMap<string, string>): void {
    const moved = [...names].map(([from, to]) => ({ from, to, index: this.index(from) }));
    for (const { from } of moved) this.indexes.delete(from);
    for (const { to, index } of moved) {
      index.uid = to;
      this.indexes.set(to, index);
    }
    this.tasks.renameIndex((uid) => names.get(uid) ?? uid);
  }
}

/** Up to so many documents an index is made ready within its task; a larger one once no task is waiting. */
const READY_AT_ONCE_MAX = 2000;

function touch(index: SearchIndex): void {
  index.updatedAt = new Date().toISOString();
  if (index.count <= READY_AT_ONCE_MAX) index.prepare();
}
