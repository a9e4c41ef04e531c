import type { Drawn } from '#shared/protocol/messages';

/** Where a display keeps reports over a reload: localStorage, or nothing. */
export type KeepStore = Pick<Storage, 'getItem' | 'setItem'>;

/** Reports kept while the hub is away; the oldest go first when there are more. */
const mostKept = 2000;
/** Most reports in one message. */
const mostSent = 64;

interface Kept {
  seq: number;
  list: Drawn[];
}

/**
 * Drawn reports that the as-run log has not confirmed, in order, numbered without a hole, over reloads when there is
 * somewhere to keep them.
 */
export class DrawnQueue {
  private seq: number;
  private list: Drawn[];

  constructor(
    private readonly key: string,
    private readonly store: KeepStore | null,
  ) {
    const kept = this.read();
    this.seq = kept.seq;
    this.list = kept.list;
  }

  private read(): Kept {
    try {
      const parsed: unknown = JSON.parse(this.store?.getItem(this.key) ?? 'null');
      if (typeof parsed === 'object' && parsed !== null && 'seq' in parsed && 'list' in parsed)
        return parsed as Kept;
    } catch {
      // Unreadable: begin anew. The log tells equal numbers apart by their times.
    }
    return { seq: 0, list: [] };
  }

  private write(): void {
    try {
      this.store?.setItem(this.key, JSON.stringify({ seq: this.seq, list: this.list } satisfies Kept));
    } catch {
      // Storage is full or forbidden: reports live as long as the page.
    }
  }

  add(drawn: Omit<Drawn, 'seq'>): void {
    this.seq += 1;
    this.list.push({ ...drawn, seq: this.seq });
    if (this.list.length > mostKept) this.list.splice(0, this.list.length - mostKept);
    this.write();
  }

  /** The log has all of a display's reports up to this number. True when that was news and more reports wait. */
  logged(displayId: string, seq: number): boolean {
    const before = this.list.length;
    this.list = this.list.filter((drawn) => drawn.displayId !== displayId || drawn.seq > seq);
    if (this.list.length === before) return false;
    this.write();
    return this.list.length > 0;
  }

  /** What waits, in messages of one display each, oldest first. */
  waiting(): Drawn[][] {
    const byDisplay = new Map<string, Drawn[]>();
    for (const drawn of this.list)
      byDisplay.set(drawn.displayId, [...(byDisplay.get(drawn.displayId) ?? []), drawn]);
    return [...byDisplay.values()].map((list) => list.slice(0, mostSent));
  }

  get size(): number {
    return this.list.length;
  }
}
