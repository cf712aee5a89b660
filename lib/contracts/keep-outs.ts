import { z } from "zod";
import { id } from "./base";

const name = z.string().trim().min(1, "is missing").max(60, "has more than 60 characters");
const note = z.string().trim().max(300, "has more than 300 characters").default("");
const axes = ["x", "y", "z"] as const;

/** A place in cooler coordinates, mm: x, y, z. */
const corner = z
  .array(z.number().min(-1000, "lies more than 1000 mm away").max(1000, "lies more than 1000 mm away"))
  .length(3, "has not three figures: write x, y and z");

/** A box that a fan must stay clear of, in cooler coordinates, mm; each side of `maxMm` lies above that of `minMm`. */
export const newKeepOutBox = z
  .strictObject({ name, minMm: corner, maxMm: corner, note })
  .superRefine(({ minMm, maxMm }, context) => {
    if (minMm.length !== axes.length || maxMm.length !== axes.length) return;
    const flat = axes.filter((_, axis) => (maxMm[axis] ?? 0) <= (minMm[axis] ?? 0));
    if (flat.length === 0) return;
    context.addIssue({ code: "custom", path: ["maxMm"], message: `is not above the smallest in ${flat.join(", ")}` });
  });
export type NewKeepOutBox = z.output<typeof newKeepOutBox>;

/** The largest model file of a solid, bytes. */
export const keepOutFileMaxBytes = 32_000_000;

/** Millimetres in one unit of a file, by the unit's sign; "file" is the unit that a 3MF names by itself. */
export const keepOutUnits = { mm: 1, cm: 10, m: 1000, in: 25.4, file: undefined } as const;
export type KeepOutUnit = keyof typeof keepOutUnits;

/** What is said of a solid's model file, which is the request's body. Its unit is never guessed. */
export const newKeepOutMesh = z.strictObject({
  name,
  note,
  unit: z.enum(Object.keys(keepOutUnits) as KeepOutUnit[], { error: "is missing: mm, cm, m, in or file" }),
});
export type NewKeepOutMesh = z.output<typeof newKeepOutMesh>;

const place = z.array(z.number()).length(3).nullable();

/** Keep-out solids of a bench version; `frozen` says why they stand as they are, null while they can be changed. */
export const benchKeepOuts = z.strictObject({
  frozen: z.string().nullable(),
  items: z.array(
    z.strictObject({
      id,
      name: z.string(),
      shape: z.enum(["box", "mesh"]),
      note: z.string(),
      /** The corners of a box; how far a mesh reaches, null where that was not kept. */
      minMm: place,
      maxMm: place,
    }),
  ),
});
export type BenchKeepOuts = z.infer<typeof benchKeepOuts>;
