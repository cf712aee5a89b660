import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";

const app = path.resolve(import.meta.dirname, "../../../app");
const methods = ["GET", "POST", "PUT", "PATCH", "DELETE", "OPTIONS", "HEAD"];

/**
 * Every route that the files under app/ make: `GET /api/v1/people` for each method that a route file exports,
 * `PAGE /host/people` for each page. Groups in parentheses are no part of an address.
 */
export function routesOfTree(folder = app): string[] {
  const files = readdirSync(folder, { recursive: true, encoding: "utf8" });
  return files
    .flatMap((file) => {
      const name = path.basename(file);
      if (!/^(route|page)\.tsx?$/.test(name)) return [];
      const parts = path.dirname(file).split(path.sep);
      const address = `/${parts.filter((part) => part !== "." && !/^\(.*\)$/.test(part)).join("/")}`;
      if (name.startsWith("page")) return [`PAGE ${address}`];
      return methodsOf(readFileSync(path.join(folder, file), "utf8")).map((method) => `${method} ${address}`);
    })
    .sort();
}

/** Methods that a route file exports, however it is written. */
export function methodsOf(text: string): string[] {
  const exported = text
    .split("\n")
    .filter((line) => line.startsWith("export "))
    .join("\n");
  return methods.filter((method) => new RegExp(`\\b${method}\\b`).test(exported));
}
