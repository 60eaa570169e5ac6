// A page of the browser as its reader has it. Pages of Playwright keep a decoded copy of all that they load, which takes as
// long as reading it; this one is only looked at.
import type { Browser } from 'playwright-core';

export interface BarePage {
  /** Once the page has been asked for; it need not be there yet. */
  open(address: string): Promise<void>;
  /** The value of the expression in the page; undefined where the page is on its way. */
  evaluate(expression: string): Promise<unknown>;
  close(): Promise<void>;
}

interface Answer {
  readonly result?: { readonly value?: unknown };
}

/** `first` is run in every document before any script of its own. */
export async function openBare(browser: Browser, first: string): Promise<BarePage> {
  const root = await browser.newBrowserCDPSession();
  const { browserContextId } = await root.send('Target.createBrowserContext');
  const { targetId } = await root.send('Target.createTarget', { url: 'about:blank', browserContextId });
  const { sessionId } = await root.send('Target.attachToTarget', { targetId, flatten: false });
  const waiting = new Map<number, (answer: Answer) => void>();
  root.on('Target.receivedMessageFromTarget', ({ message }) => {
    const { id, result }: { id?: number; result?: Answer } = JSON.parse(message);
    if (id === undefined) return;
    waiting.get(id)?.(result ?? {});
    waiting.delete(id);
  });
  let asked = 0;
  const ask = (method: string, params: object = {}): Promise<Answer> => {
    const id = ++asked;
    const answer = new Promise<Answer>((resolve) => waiting.set(id, resolve));
    return root
      .send('Target.sendMessageToTarget', { sessionId, message: JSON.stringify({ id, method, params }) })
      .then(() => answer);
  };
  await ask('Page.enable');
  await ask('Page.addScriptToEvaluateOnNewDocument', { source: first });
  return {
    open: async (url) => void (await ask('Page.navigate', { url })),
    evaluate: async (expression) => (await ask('Runtime.evaluate', { expression })).result?.value,
    async close() {
      await root.send('Target.closeTarget', { targetId });
      await root.send('Target.disposeBrowserContext', { browserContextId });
      await root.detach();
    },
  };
}
