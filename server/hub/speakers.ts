import type { ToHub } from '#shared/protocol/messages';
import { hubLimits } from './limits';
import type { Seat } from './seat';

/** What a display says of itself. */
export type Report = Extract<ToHub, { type: 'vitals' | 'drawn' | 'picture' }>;

/** The one display that a report is of; null when it mixes several. */
export function speakerOf(report: Report): string | null {
  if (report.type === 'vitals') return report.vitals.displayId;
  if (report.type === 'picture') return report.picture.displayId;
  const [first] = report.drawn;
  return first && report.drawn.every(({ displayId }) => displayId === first.displayId)
    ? first.displayId
    : null;
}

/** Which simulated displays the crew's pages speak for, so that they go when their last page goes. */
export class Speakers {
  private readonly bySeat = new Map<Seat, Set<string>>();

  /** @returns whether this page may speak for this display too: there is a limit a page */
  admit(seat: Seat, displayId: string): boolean {
    const ids = this.bySeat.get(seat) ?? new Set();
    if (!ids.has(displayId) && ids.size >= hubLimits.simulatedPerPage) return false;
    this.bySeat.set(seat, ids.add(displayId));
    return true;
  }

  /** @returns displays that nobody speaks for any more */
  leave(seat: Seat): string[] {
    const ids = [...(this.bySeat.get(seat) ?? [])];
    this.bySeat.delete(seat);
    return ids.filter((id) => ![...this.bySeat.values()].some((others) => others.has(id)));
  }
}
