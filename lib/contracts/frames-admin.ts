import { z } from "zod";
import { id } from "./base";

const mm = (least: number, most: number) =>
  z.number().min(least, `is less than ${least} mm`).max(most, `is more than ${most} mm`);

/** Classes that frames come in, mm; frames of a class are within a few millimetres of it. */
export const frameClasses = ["80", "92", "120", "140"] as const;
const offClassMaxMm = 5;

/**
 * A frame's figures, mm. Its name is class by depth; `word` tells frames apart that have both alike.
 * The holes lie inside the square and outside the bore.
 */
export const frameFigures = z
  .strictObject({
    frameClass: z.enum(frameClasses, { error: `is none of ${frameClasses.join(", ")}` }),
    outerMm: mm(60, 160),
    depthMm: mm(5, 100),
    boreMm: mm(20, 160),
    holeSpacingMm: mm(20, 160),
    holeDiameterMm: mm(1, 15),
    toleranceMm: mm(0, 5),
    word: z
      .string()
      .trim()
      .regex(/^[a-z0-9]{0,12}$/, "has more than 12 lower-case letters and digits")
      .default(""),
  })
  .superRefine((frame, context) => {
    const { outerMm, boreMm, holeSpacingMm, holeDiameterMm } = frame;
    const wrong = (path: keyof typeof frame, message: string) =>
      context.addIssue({ code: "custom", path: [path], message });
    if (Math.abs(outerMm - Number(frame.frameClass)) > offClassMaxMm)
      wrong("outerMm", `is more than ${offClassMaxMm} mm off its class`);
    if (boreMm >= outerMm) wrong("boreMm", "is not smaller than the outer size");
    if (holeSpacingMm + holeDiameterMm >= outerMm) wrong("holeSpacingMm", "lets the holes leave the frame");
    else if (holeSpacingMm * Math.SQRT2 - holeDiameterMm <= boreMm)
      wrong("holeSpacingMm", "lets the holes cut into the bore");
    if (2 * frame.toleranceMm >= boreMm) wrong("toleranceMm", "leaves nothing of the bore");
  });
export type FrameFigures = z.output<typeof frameFigures>;

/** A frame for the host; `frozen` says why its figures stand, null while they can be changed. */
export const hostFrame = z.strictObject({
  id,
  key: z.string(),
  frozen: z.string().nullable(),
  figures: z.strictObject({
    frameClass: z.enum(frameClasses),
    outerMm: z.number(),
    depthMm: z.number(),
    boreMm: z.number(),
    holeSpacingMm: z.number(),
    holeDiameterMm: z.number(),
    toleranceMm: z.number(),
    word: z.string(),
  }),
});
export type HostFrame = z.infer<typeof hostFrame>;
export const hostFrames = z.strictObject({ items: z.array(hostFrame) });
