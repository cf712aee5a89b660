import { writeFile } from "node:fs/promises";
import { format } from "prettier";
import { countChecks, countsFile, listReferenceTests } from "./count-checks";

// Counts the reference tests anew for the method page: node --import tsx tests/reference/support/count-reference-checks.ts
const text = JSON.stringify(countChecks(await listReferenceTests()));
await writeFile(countsFile, await format(text, { parser: "json", printWidth: 120 }));
