import { partParams, partRecord } from "@/lib/contracts/bench-prints";
import { route } from "@/lib/http/route";
import { recordPart } from "@/lib/server/bench/specimens";

/** Records mass, balance and spin-up of one rotor of a copy. */
export const PUT = route(
  { access: "signed_in", params: partParams, body: partRecord },
  async ({ actor, params, body, requestId }) =>
    recordPart(
      { actor, requestId },
      { specimenId: params.id, rotorPosition: params.position, at: new Date(), ...body },
    ),
);
