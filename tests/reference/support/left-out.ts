/** Check values of the handbook of metrology that no test runs, each with its reason. A test holds the list to the file. */
export const LEFT_OUT: Readonly<Record<string, string>> = {
  "T11-03":
    "the z-score sum is no rule of the product: it breaks independence of other entries, which this value shows",
  "T11-05":
    "checks a piecewise-linear reading; equal noise here is PCHIP, as ruled at the handbook's beginning, and is held to scipy's",
};
