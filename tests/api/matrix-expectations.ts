import { benchRows } from "./matrix-rows/bench-rows";
import { hostRows } from "./matrix-rows/host-rows";
import { memberRows } from "./matrix-rows/member-rows";
import { publicRows } from "./matrix-rows/public-rows";
import type { MatrixRows } from "./support/matrix-row";

/** Rows by who they are for; no route stands in two of them. */
export const matrixRooms: readonly MatrixRows[] = [publicRows, memberRows, benchRows, hostRows];

/** Every route × every role. A route that isn't here, or is here and not in the tree, fails the test. */
export const matrix: MatrixRows = Object.assign({}, ...matrixRooms);
