/**
 * The steps of an asynchronous iteration, one promise of a result after the other, for a loop that waits for each itself:
 * a cell's top-level `for await` is compiled into such a loop. Leaving the loop early closes the iteration.
 */
export function* asyncSteps(source: unknown): Generator<Promise<IteratorResult<unknown>>, void, void> {
  const steps = iteratorOf(source);
  let ended = false;
  const taken = (step: IteratorResult<unknown>) => {
    ended = step.done === true;
    return step;
  };
  const failed = (error: unknown) => {
    ended = true;
    throw error;
  };
  try {
    while (!ended) yield Promise.resolve(steps.next()).then(taken).catch(failed);
  } finally {
    if (!ended) void steps.return?.();
  }
}

function iteratorOf(source: unknown): AsyncIterator<unknown> {
  const asynchronous = (source as AsyncIterable<unknown>)[Symbol.asyncIterator];
  if (asynchronous) return asynchronous.call(source);
  const iterator = (source as Iterable<unknown>)[Symbol.iterator]();
  return {
    next: async () => {
      const { done, value } = iterator.next();
      return { done: done === true, value: await value } as IteratorResult<unknown>;
    },
    return: async () => ({ done: true, value: iterator.return?.().value }),
  };
}
