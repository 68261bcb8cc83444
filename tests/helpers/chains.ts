/** A Markov chain as a map from each state to where it goes next, with probabilities. */
type Step<S> = (state: S) => [S, number][];

/**
 * Stationary distribution by power iteration over the states that can be reached.
 * @returns Probability by state, and the state itself.
 */
export function solveChain<S>(start: S, step: Step<S>): { state: S; probability: number }[] {
  const index = new Map<string, number>();
  const states: S[] = [];
  const edges: [number, number][][] = [];
  const enter = (state: S): number => {
    const key = JSON.stringify(state);
    const known = index.get(key);
    if (known !== undefined) return known;
    index.set(key, states.length);
    states.push(state);
    return states.length - 1;
  };
  enter(start);
  for (let i = 0; i < states.length; i++)
    edges.push(step(states[i]).map(([next, p]): [number, number] => [enter(next), p]));
  let now = new Float64Array(states.length).fill(1 / states.length);
  for (let round = 0; round < 200_000; round++) {
    const next = new Float64Array(states.length);
    edges.forEach((targets, i) => targets.forEach(([to, p]) => (next[to] += now[i] * p)));
    // Half a step at a time: a chain with a period settles too.
    let change = 0;
    for (let i = 0; i < next.length; i++) {
      next[i] = (next[i] + now[i]) / 2;
      change += Math.abs(next[i] - now[i]);
    }
    now = next;
    if (change < 1e-14) break;
  }
  return states.map((state, i) => ({ state, probability: now[i] }));
}

type Machine = {
  isUp(state: number): boolean;
  start: number;
  next(state: number, hasWorked: boolean): [number, number][];
};

/** Up in each tick by itself. The draw of the tick is part of the state before it. */
export const bernoulliMachine = (p: number): Machine => ({
  isUp: (state) => state === 1,
  start: 1,
  next: () => [
    [1, p],
    [0, 1 - p],
  ],
});

/** Geometric up and down times, drawn after the tick's work; `whileRunning`: only worked ticks wear. */
export const upDownMachine = (fail: number, repair: number, whileRunning: boolean): Machine => ({
  isUp: (state) => state === 1,
  start: 1,
  next(state, hasWorked) {
    if (state === 0)
      return [
        [1, repair],
        [0, 1 - repair],
      ];
    if (whileRunning && !hasWorked) return [[1, 1]];
    return [
      [1, 1 - fail],
      [0, fail],
    ];
  },
});

/**
 * A serial line of machines whose unit takes one tick, served downstream first as the model page has it: the chain's
 * throughput and the mean level of each buffer at the ends of ticks.
 */
export function solveSerialLine(
  machines: readonly Machine[],
  sizes: readonly number[],
): { rate: number; levels: number[] } {
  type State = { levels: number[]; machines: number[] };
  const work = (state: State): { levels: number[]; worked: boolean[] } => {
    const levels = [...state.levels];
    const worked = machines.map(() => false);
    for (let i = machines.length - 1; i >= 0; i--) {
      const hasPart = i === 0 || levels[i - 1] > 0;
      const hasRoom = i === machines.length - 1 || levels[i] < sizes[i];
      if (!machines[i].isUp(state.machines[i]) || !hasPart || !hasRoom) continue;
      worked[i] = true;
      if (i > 0) levels[i - 1]--;
      if (i < machines.length - 1) levels[i]++;
    }
    return { levels, worked };
  };
  const solved = solveChain<State>(
    { levels: sizes.map(() => 0), machines: machines.map(({ start }) => start) },
    (state) => {
      const { levels, worked } = work(state);
      return machines.reduce<[State, number][]>(
        (open, machine, i) =>
          open.flatMap(([next, p]) =>
            machine
              .next(state.machines[i], worked[i])
              .map(([to, q]): [State, number] => [{ levels, machines: [...next.machines, to] }, p * q]),
          ),
        [[{ levels, machines: [] }, 1]],
      );
    },
  );
  let rate = 0;
  const levels = sizes.map(() => 0);
  for (const { state, probability } of solved) {
    const after = work(state);
    if (after.worked[machines.length - 1]) rate += probability;
    after.levels.forEach((level, i) => (levels[i] += level * probability));
  }
  return { rate, levels };
}
