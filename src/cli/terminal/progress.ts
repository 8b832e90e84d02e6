import { Presets, SingleBar } from 'cli-progress';
import type { Progress } from '../../model/run.js';
import type { Terminal } from './terminal.js';

/** A line on a watched terminal that tells how far the work is; silence anywhere else. Call `close` when all is done. */
export function progressLine(terminal: Terminal): { tell(progress: Progress): void; close(): void } {
  if (!terminal.watched) return { tell: () => {}, close: () => {} };
  const bar = new SingleBar(
    {
      format: (_, { value, total }, { stage: name }) => (total > 0 ? `${name}  ${value} of ${total}` : `${name}`),
      clearOnComplete: true,
      hideCursor: true,
      stream: process.stderr,
      linewrap: false,
    },
    Presets.legacy,
  );
  let stage = '';
  return {
    tell(progress) {
      if (progress.stage !== stage) {
        if (stage) bar.stop();
        stage = progress.stage;
        bar.start(progress.total, progress.done, { stage });
      }
      bar.setTotal(progress.total);
      bar.update(progress.done, { stage });
    },
    close() {
      if (stage) bar.stop();
    },
  };
}
