// Asking the service. Every answer is one of {answer}, {violations} and
// {failure}, a sentence; one that was not waited for is undefined.

const tooLong = '/problems/answer-took-too-long';

// classify asks for the answer to a case; query holds parameters such as
// what_if.
export async function classify(kase, signal, query = {}) {
  return ask('/v1/classify', kase, signal, query, async (r) => ({ answer: await r.json() }));
}

// report asks for the answer to a case in a form to take away, as a blob.
export async function report(kase, format) {
  return ask('/v1/classify', kase, undefined, { format }, async (r) => ({ blob: await r.blob() }));
}

// map asks for a map over two inputs, named as in messages, as a drawing.
export async function map(kase, x, y, signal) {
  return ask('/v1/map', { case: kase, x: { input: x }, y: { input: y } }, signal, { format: 'svg' }, async (r) => ({ drawing: await r.text() }));
}

async function ask(path, body, signal, query, read) {
  try {
    const parameters = String(new URLSearchParams(query));
    const response = await fetch(path + (parameters && '?' + parameters), {
      method: 'POST', headers: { 'Content-Type': 'application/json' }, body: JSON.stringify(body), signal,
    });
    if (response.ok) return await read(response);
    const problem = await response.json();
    if (problem.violations && response.status === 422) return { violations: problem.violations };
    if (problem.type === tooLong) return { late: true, failure: 'The answer was not ready in time. Nothing is wrong with the case; the service is asked again at the next change.' };
    return { failure: `${problem.title}: ${problem.detail}` };
  } catch (error) {
    if (signal?.aborted) return undefined;
    return { failure: 'The service can’t be reached; it is asked again at the next change. (' + error.message + ')' };
  }
}
