// What is thrown when we are wrong. Wrong input is reported as issues and a calculation that cannot go on as a
// failed outcome; neither is thrown. Only the edges (command line, worker) catch.

/** The ways in which our own code can be wrong, each with the facts that a reader of the report needs. */
export type SimFault =
  /** Something that the code takes for granted did not hold. */
  | { readonly kind: 'broken-invariant'; readonly claim: string }
  /** An array does not have the length that its owner promised; lengths in entries. */
  | {
      readonly kind: 'wrong-size';
      readonly array: string;
      readonly expected: number;
      readonly received: number;
    }
  /** A number that must be finite is NaN or infinite. */
  | { readonly kind: 'not-finite'; readonly quantity: string; readonly value: number };

function sentence(fault: SimFault): string {
  switch (fault.kind) {
    case 'broken-invariant':
      return `does not hold: ${fault.claim}`;
    case 'wrong-size':
      return `${fault.array} has ${fault.received} entries, expected ${fault.expected}`;
    case 'not-finite':
      return `${fault.quantity} is ${fault.value}, expected a finite number`;
  }
}

/** A fault of the simulator itself. Match `fault.kind` and its fields, not the message. */
export class SimError extends Error {
  /** What went wrong. */
  readonly fault: SimFault;

  /** Makes the message from `fault`. */
  constructor(fault: SimFault) {
    super(sentence(fault));
    this.name = 'SimError';
    this.fault = fault;
  }
}

/**
 * States what must hold here if the code is right.
 *
 * @param condition - What must be true.
 * @param message - The claim in words, true when the condition is: "the layout has a segment".
 * @throws SimError of kind `broken-invariant`.
 */
export function invariant(condition: boolean, message: string): asserts condition {
  if (!condition) throw new SimError({ kind: 'broken-invariant', claim: message });
}
