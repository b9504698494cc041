import { inject, Injectable, signal } from '@angular/core';
import { applyChanges } from '#shared/floor/apply';
import { judge } from '#shared/floor/judge';
import type { FloorCommand } from '#shared/floor/model';
import type { Refusal } from '#shared/floor/refusal';
import { stepAt, type Place } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { cautionLine, CAUTION_ENDING } from '#shared/words/caution-words';
import { doneSentence } from '#shared/words/command-words';
import type { CommandAnswerFragment } from '../graphql/generated/graphql';
import { Ask } from '../ui/ask';
import { failureSentence } from '../ui/failure-sentence';
import { moveTo, type Overridable } from './drop-verdict';
import { FloorJudging } from './floor-judging';
import { FloorSend } from './floor-send';
import { FloorStore } from './floor-store';
import type { BoardBatch } from './floor-view';
import { Notices } from './notices';

/**
 * Everything a person does to a batch. A command is judged here first; what the rules allow is shown at once and replaced
 * by the server's answer, what they refuse is said and changes nothing.
 */
@Injectable()
export class FloorCommands {
  private readonly store = inject(FloorStore);
  private readonly judging = inject(FloorJudging);
  private readonly send = inject(FloorSend);
  private readonly ask = inject(Ask);
  private readonly notices = inject(Notices);
  private readonly waiting = new Map<string, Promise<unknown>>();
  private readonly busyNow = signal<ReadonlySet<string>>(new Set());

  /** Batches with a command under way. */
  readonly busy = this.busyNow.asReadonly();

  /** Starts a step on pieces; `happenedAt` where it was begun before it is recorded. */
  start(
    batchId: string,
    step: string,
    pieces: readonly number[],
    happenedAt: Instant | null = null,
  ): Promise<boolean> {
    return this.give(batchId, { kind: 'START', step, pieces, happenedAt, override: null });
  }

  finish(
    batchId: string,
    step: string,
    pieces: readonly number[],
    happenedAt: Instant | null = null,
  ): Promise<boolean> {
    return this.give(batchId, { kind: 'FINISH', step, pieces, happenedAt, override: null });
  }

  assign(batchId: string, memberId: string | null): Promise<boolean> {
    return this.give(batchId, { kind: 'ASSIGN', memberId });
  }

  /** Moves a batch; a move back asks for the reason of the rework first. */
  async move(batchId: string, to: Place): Promise<boolean> {
    const batch = this.store.all().get(batchId);
    if (!batch) return false;
    const verdict = this.judging.drop(batch, to);
    if (verdict.kind === 'HERE') return false;
    if (verdict.kind === 'REFUSE') {
      this.refuse(batch, moveTo(to), verdict.refusal);
      return false;
    }
    if (!verdict.isRework) return this.give(batchId, moveTo(to));
    const answer = await this.ask.ask({
      heading: `Move ${batch.floor.code} back`,
      text: 'This is rework: the steps from there on are put back and have to be done again.',
      action: 'Move back',
      needsReason: true,
      reasonLabel: 'Why it goes back',
    });
    if (!answer) return false;
    return this.give(batchId, { ...moveTo(to), reason: answer.reason });
  }

  /** Cuts the holds short that keep a command back, after the cautions were read and a reason was written. */
  async override(batchId: string, command: Overridable): Promise<boolean> {
    const batch = this.store.all().get(batchId);
    if (!batch) return false;
    const verdict = judge(this.judging.view(batch), batch.floor, command, this.judging.actor());
    const cautions = this.judging.cautions(batch, command);
    if (verdict.ok || cautions === null) return this.give(batchId, command);
    const answer = await this.ask.ask({
      heading: `Override the hold on ${batch.floor.code}`,
      text: `${this.judging.sentence(batch, verdict.refusal)} An override stays visible on the batch for ever, and the owner is told.`,
      action: 'Override the hold',
      caution: [...cautions.map(cautionLine), CAUTION_ENDING].join(' '),
      needsReason: true,
      reasonLabel: 'Why it cannot wait',
      dangerous: true,
    });
    if (!answer) return false;
    return this.give(batchId, { ...command, override: answer });
  }

  /** Takes the last command on a batch back. */
  async undo(batchId: string, event: number): Promise<boolean> {
    const done = await this.inTurn(batchId, async () => {
      const answer = await this.send.undo(batchId, event);
      this.take(answer);
      return answer.problems.length === 0;
    });
    const code = this.store.all().get(batchId)?.floor.code;
    if (done && code) this.notices.say(`${code}: taken back.`);
    return done;
  }

  private async give(batchId: string, command: FloorCommand): Promise<boolean> {
    return this.inTurn(batchId, async () => {
      const batch = this.store.all().get(batchId);
      const whyNot = this.judging.whyNot();
      if (!batch) return false;
      if (whyNot !== null) {
        this.notices.say(whyNot, { isRefusal: true });
        return false;
      }
      const verdict = judge(this.judging.view(batch), batch.floor, command, this.judging.actor());
      if (!verdict.ok) {
        this.refuse(batch, command, verdict.refusal);
        return false;
      }
      this.store.guess({ ...batch, floor: applyChanges(batch.floor, verdict.changes) });
      const answer = await this.send.command(batch.floor, command);
      this.take(answer);
      if (answer.problems.length > 0) return false;
      this.notices.say(this.done(batch, command), this.undoOf(batchId, answer.event));
      return true;
    });
  }

  /** One command after the other on the same batch: the second names the version that the first has made. */
  private async inTurn(batchId: string, work: () => Promise<boolean>): Promise<boolean> {
    const before = this.waiting.get(batchId) ?? Promise.resolve();
    const mine = before.then(async () => {
      this.busyNow.update((busy) => new Set(busy).add(batchId));
      try {
        return await work();
      } catch (error) {
        this.notices.say(failureSentence(error), { isRefusal: true });
        return false;
      } finally {
        this.store.settle(batchId);
        this.busyNow.update((busy) => new Set([...busy].filter((id) => id !== batchId)));
      }
    });
    this.waiting.set(batchId, mine);
    try {
      return await mine;
    } finally {
      if (this.waiting.get(batchId) === mine) this.waiting.delete(batchId);
    }
  }

  private take(answer: CommandAnswerFragment): void {
    if (answer.batch) this.store.take(answer.batch);
    const [problem] = answer.problems;
    if (problem) this.notices.say(problem.sentence, { isRefusal: true });
  }

  private refuse(batch: BoardBatch, command: FloorCommand, refusal: Refusal): void {
    const text = this.judging.sentence(batch, refusal);
    const isHold = refusal.code === 'HOLD_RUNNING' && command.kind !== 'ASSIGN';
    const canOverride = isHold && this.judging.cautions(batch, command) !== null;
    const override = canOverride
      ? {
          name: 'Override the hold …',
          run: () => void this.override(batch.floor.id, command),
        }
      : null;
    this.notices.say(text, { isRefusal: true, action: override });
  }

  private done({ floor }: BoardBatch, command: FloorCommand): string {
    const step = 'step' in command ? (stepAt(floor.route, command.step)?.step ?? null) : null;
    const memberId = command.kind === 'ASSIGN' ? command.memberId : null;
    const person = memberId === null ? null : this.store.around()?.people.get(memberId);
    return doneSentence(floor.code, command, {
      stepName: step?.name ?? null,
      scope: step?.scope ?? 'BATCH',
      personName: person?.name ?? null,
    });
  }

  private undoOf(batchId: string, event: number | null) {
    if (event === null) return {};
    return { action: { name: 'Undo', run: () => void this.undo(batchId, event) } };
  }
}
