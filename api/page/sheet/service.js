// Asking the service. Every answer is one of {answer}, {violations} and
// {failure}, a sentence; one that was not waited for is undefined.

export async function classify(kase, signal, fields = '') {
  try {
    const response = await fetch('/v1/classify' + (fields && '?fields=' + fields), {
      method: 'POST', headers: { 'Content-Type': 'application/json' }, body: JSON.stringify(kase), signal,
    });
    const body = await response.json();
    if (response.ok) return { answer: body };
    return body.violations && response.status === 422 ? { violations: body.violations } : { failure: `${body.title}: ${body.detail}` };
  } catch (error) {
    if (signal?.aborted) return undefined;
    return { failure: 'The service can’t be reached; it is asked again at the next change. (' + error.message + ')' };
  }
}
