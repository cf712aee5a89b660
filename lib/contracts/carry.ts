/** A design of one's own that a model can be carried into. */
export interface CarryDesign {
  readonly slug: string;
  readonly name: string;
  /** The letter of its draft, or of the revision that would be made. */
  readonly letter: string;
  /** Whether that revision is there already and wasn't sent in. */
  readonly draft: boolean;
}

/** Where somebody signed in can carry a model to. */
export interface CarryChoices {
  readonly designs: readonly CarryDesign[];
  readonly frames: readonly { readonly id: string; readonly key: string }[];
}
