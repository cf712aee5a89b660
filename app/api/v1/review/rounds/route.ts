import { reviewList } from "@/lib/contracts/review";
import { route } from "@/lib/http/route";
import { readReviewList } from "@/lib/server/review/review-access";

/** Rounds before their hour, for those who review; a member's are those that were lent to them. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => reviewList.parse(await readReviewList(actor)));
