import type { Engine } from "./engine";
import { ServiceError } from "./errors";
import type { Route } from "./http";
import { accepted, indexUidOf, ok, readJson } from "./http";
import { SETTING_ROUTES, defaultSettings } from "./index-settings";
import { checkSetting, checkSettings } from "./settings-check";

/** /settings as a whole and each of its sub-routes. */
export function settingsRoutes(engine: Engine): Route[] {
  const base = "/indexes/:index/settings";
  const allNull = Object.fromEntries(Object.keys(defaultSettings()).map((name) => [name, null]));
  const whole: Route[] = [
    {
      method: "GET",
      path: base,
      action: "settings.get",
      handle: (exchange) => ok(engine.index(indexUidOf(exchange, "settings.get")).settings),
    },
    {
      method: "PATCH",
      path: base,
      action: "settings.update",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "settings.update");
        return accepted(engine.changeSettings(uid, checkSettings(await readJson(exchange)), true));
      },
    },
    {
      method: "DELETE",
      path: base,
      action: "settings.update",
      handle: (exchange) => accepted(engine.changeSettings(indexUidOf(exchange, "settings.update"), allNull, false)),
    },
  ];
  const parts = SETTING_ROUTES.flatMap(({ path, name, method }): Route[] => [
    {
      method: "GET",
      path: `${base}/${path}`,
      action: "settings.get",
      handle: (exchange) => ok(engine.index(indexUidOf(exchange, "settings.get")).settings[name]),
    },
    {
      method,
      path: `${base}/${path}`,
      action: "settings.update",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "settings.update");
        const value = await readJson(exchange);
        if (value === undefined) throw new ServiceError("missing_payload", "A json payload is missing.");
        checkSetting(name, value, "");
        return accepted(engine.changeSettings(uid, { [name]: value }, true));
      },
    },
    {
      method: "DELETE",
      path: `${base}/${path}`,
      action: "settings.update",
      handle: (exchange) =>
        accepted(engine.changeSettings(indexUidOf(exchange, "settings.update"), { [name]: null }, false)),
    },
  ]);
  return [...whole, ...parts];
}
