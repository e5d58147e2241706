import { fork } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import type { BystanderOrder, BystanderReport, Errand } from './bystander.ts';

const PROGRAM = fileURLToPath(new URL('./bystander.ts', import.meta.url));

export interface Bystander {
  /** Resolves once it is asking; `end` gives what each request took, in milliseconds. */
  begin: (errand: Errand) => Promise<{ end: () => Promise<number[]> }>;
  stop: () => void;
}

/** Someone else at the same server, in a process of its own. */
export function startBystander(): Bystander {
  const child = fork(PROGRAM, { execArgv: ['--import', 'tsx'] });
  const order = (message: BystanderOrder) => child.send(message);
  const next = <T>() =>
    new Promise<T>((resolve, reject) => {
      const fallen = () => reject(new Error('The bystander fell; its lines above say why.'));
      child.once('exit', fallen);
      child.once('message', (message) => {
        child.off('exit', fallen);
        resolve(message as T);
      });
    });
  return {
    async begin(errand) {
      const ready = next<{ ready: true }>();
      order({ begin: errand });
      await ready;
      return {
        async end() {
          const report = next<BystanderReport>();
          order({ end: true });
          return (await report).times;
        },
      };
    },
    stop: () => void child.kill(),
  };
}
