import type { FromHub } from '#shared/protocol/messages';
import { notSentWords } from '#shared/show/words';
import type { CommandResult } from './types';

interface Asked {
  answer: (result: CommandResult) => void;
  timer: ReturnType<typeof setTimeout>;
}

/** How long after a command's end its answer is waited for, ms: it may be on its way. */
const graceMs = 300;

/** Commands that have been sent and not answered. */
export class CommandsInFlight {
  private readonly asked = new Map<string, Asked>();

  /** Resolves with the hub's answer, or with `not-sent` a little after the command has expired. */
  wait(id: string, expiryMs: number): Promise<CommandResult> {
    return new Promise((answer) => {
      const timer = setTimeout(() => {
        this.asked.delete(id);
        answer({ outcome: 'not-sent', words: notSentWords.noAnswer });
      }, expiryMs + graceMs);
      this.asked.set(id, { answer, timer });
    });
  }

  take(message: Extract<FromHub, { type: 'taken' | 'refused' }>): void {
    const asked = this.asked.get(message.commandId);
    if (!asked) return;
    clearTimeout(asked.timer);
    this.asked.delete(message.commandId);
    asked.answer(
      message.type === 'taken'
        ? { outcome: 'taken', revision: message.revision, landsAt: message.landsAt }
        : { outcome: 'refused', code: message.code, words: message.words },
    );
  }

  /** The link is gone for good. */
  giveUp(): void {
    for (const { answer, timer } of this.asked.values()) {
      clearTimeout(timer);
      answer({ outcome: 'not-sent', words: notSentWords.noLink });
    }
    this.asked.clear();
  }
}
