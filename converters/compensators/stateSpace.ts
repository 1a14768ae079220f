/** ẋ = A·x + B·u, y = C·x + D·u with one input (output voltage) and one output (control voltage, inversion removed). */
export interface StateSpace {
  readonly A: number[][]
  readonly B: number[][]
  readonly C: number[][]
  readonly D: number[][]
}

/** Rates of change and output of a linear circuit. Names that are not fitted read as zero and their rates are ignored. */
export type LinearCircuit<State extends string> = (
  state: Readonly<Record<State, number>>,
  input: number,
) => { readonly rates: Readonly<Record<State, number>>; readonly output: number }

/**
 * State equations of a linear circuit, column by column: each is its answer to one state, or the input, at 1.
 * @param all - every state that the circuit may have
 * @param fitted - those that it has, in the order of the matrices
 */
export function stateSpaceOf<State extends string>(
  all: readonly State[],
  fitted: readonly State[],
  circuit: LinearCircuit<State>,
): StateSpace {
  const answer = (excited: State | null) => {
    const state = Object.fromEntries(all.map((name) => [name, name === excited ? 1 : 0])) as Record<State, number>
    return circuit(state, excited === null ? 1 : 0)
  }
  const columns = fitted.map((name) => answer(name))
  const fromInput = answer(null)
  return {
    A: fitted.map((name) => columns.map(({ rates }) => rates[name])),
    B: fitted.map((name) => [fromInput.rates[name]]),
    C: [columns.map(({ output }) => output)],
    D: [[fromInput.output]],
  }
}
