import { expect, test } from "vitest";
import { stated } from "@/lib/domain/results/stated";

/** JCGM 100:2008 (GUM), Table G.2: t₉₅ by degrees of freedom, printed to two decimals (values from memory). */
const tableG2: readonly (readonly [number, number])[] = [
  [1, 12.71],
  [2, 4.3],
  [4, 2.78],
  [10, 2.23],
  [20, 2.09],
  [50, 2.01],
];

test.each(tableG2)("with %d degrees of freedom a figure is told with k = %d", (dof, k) => {
  const figure = stated({ value: -2.4, u: 0.4, dof });
  expect(Number(figure.k.toFixed(2))).toBe(k);
  expect(figure.u95).toBeCloseTo(figure.k * 0.4, 12);
  expect(figure.value).toBe(-2.4);
});

test("what is taken as known exactly has the normal's k of 1.960", () => {
  expect(stated({ value: 1, u: 1, dof: null }).u95).toBeCloseTo(1.96, 3);
});

test("degrees of freedom between two whole numbers are taken down to the lower (JCGM 100:2008, G.4.1)", () => {
  expect(stated({ value: 0, u: 1, dof: 4.9 }).k).toBe(stated({ value: 0, u: 1, dof: 4 }).k);
});
