/**
 * Makes the keys of one resource, so that no component spells one: `keys.all` for everything of it, `keys.list(query)`,
 * `keys.one(id, part…)`.
 */
export function keysOf<R extends string>(resource: R) {
  return {
    all: [resource] as const,
    lists: [resource, "list"] as const,
    list: (query: object = {}) => [resource, "list", query] as const,
    one: (id: string, ...parts: (string | number)[]) => [resource, "one", id, ...parts] as const,
  };
}

export const accountKeys = keysOf("account");
export const peopleKeys = keysOf("people");
export const reviewKeys = keysOf("review");
export const hostKeys = keysOf("host");
export const myDesignKeys = keysOf("my-designs");
export const benchKeys = keysOf("bench");
export const savedKeys = keysOf("saved");
