/**
 * What the engine refuses, in words that can be shown. `field` is a path into the design document or the options
 * (`output.voltage`), so that a form can show the sentence beside the input it is about.
 */
export type DesignErrorCode =
  | 'invalid-document' // a field is missing, of the wrong kind or out of range
  | 'not-yet-supported' // a part of the document that the engine cannot compute yet
  | 'unreachable-output' // no duty cycle gives the wanted output voltage
  | 'no-operating-point' // the search for the periodic orbit failed
  | 'singular-network' // the circuit has no unique currents and voltages
  | 'invalid-compensator' // a network that cannot be built from the parts given

export interface FieldProblem {
  readonly field: string
  readonly message: string
}

export class DesignError extends Error {
  override readonly name = 'DesignError'
  constructor(
    readonly code: DesignErrorCode,
    message: string,
    readonly problems: readonly FieldProblem[],
  ) {
    super(message)
  }

  /** A refusal that is about one field. */
  static at(code: DesignErrorCode, field: string, message: string): DesignError {
    return new DesignError(code, message, [{ field, message }])
  }
}
