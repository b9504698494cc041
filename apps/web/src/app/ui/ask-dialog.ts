import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { Icon } from './icon';

export interface Question {
  readonly heading: string;
  /** What is asked, a sentence or two. */
  readonly text: string;
  /** The button that goes on, such as "Override the hold". */
  readonly action: string;
  /** Whether a written reason is needed, 3 to 500 characters. */
  readonly needsReason?: boolean;
  readonly reasonLabel?: string;
  /** A caution that has to be ticked as read before one can go on. */
  readonly caution?: string | null;
  /** Whether the button is drawn as dangerous. */
  readonly dangerous?: boolean;
}

export interface Answer {
  readonly reason: string;
  readonly cautionRead: boolean;
}

export const SHORTEST_REASON = 3;
export const LONGEST_REASON = 500;

/** The dialog behind `Ask`; pages do not use it directly. */
@Component({
  selector: 'app-ask-dialog',
  imports: [Icon],
  template: `
    <dialog
      #dialog
      aria-labelledby="ask-heading"
      aria-describedby="ask-text"
      (close)="answered.emit(answer)"
    >
      <form method="dialog" novalidate (submit)="submit($event)">
        <h2 id="ask-heading">{{ question().heading }}</h2>
        <p id="ask-text">{{ question().text }}</p>
        @if (question().caution; as caution) {
          <div class="caution">
            <app-icon name="warning" />
            <p>{{ caution }}</p>
          </div>
          <label class="ct-check">
            <input #read type="checkbox" (change)="cautionRead.set(read.checked)" />
            <span>I have read the caution.</span>
          </label>
          @if (tried() && !cautionRead()) {
            <p class="problem" role="alert">Tick that you have read the caution.</p>
          }
        }
        @if (question().needsReason) {
          <div class="ct-field">
            <label for="ask-reason">{{ question().reasonLabel ?? 'Reason' }}</label>
            <textarea
              #reason
              id="ask-reason"
              class="ct-input"
              rows="3"
              [attr.maxlength]="longest"
              aria-describedby="ask-reason-problem"
              [attr.aria-invalid]="tried() && tooShort()"
              (input)="text.set(reason.value)"
            ></textarea>
            <span id="ask-reason-problem" class="problem" role="alert">
              @if (tried() && tooShort()) {
                Write a reason of at least three letters. It stays on record.
              }
            </span>
          </div>
        }
        <div class="buttons">
          <button type="button" class="ct-button" (click)="dialog.close()">Cancel</button>
          <button
            type="submit"
            class="ct-button"
            [class.primary]="!question().dangerous"
            [class.danger]="question().dangerous"
          >
            {{ question().action }}
          </button>
        </div>
      </form>
    </dialog>
  `,
  styles: `
    dialog {
      width: min(480px, calc(100vw - 32px));
      max-height: calc(100vh - 32px);
      box-sizing: border-box;
      padding: 0;
      border: 1px solid var(--ct-line);
      border-radius: 14px;
      background: var(--ct-surface);
      color: var(--ct-ink);
      box-shadow: 0 14px 40px color-mix(in srgb, var(--ct-shadow) 28%, transparent);
    }
    dialog::backdrop {
      background: color-mix(in srgb, var(--ct-shadow) 45%, transparent);
    }
    form {
      display: grid;
      gap: 14px;
      padding: 20px;
    }
    h2,
    p {
      margin: 0;
    }
    textarea {
      resize: vertical;
    }
    .caution {
      display: flex;
      gap: 10px;
      padding: 12px;
      border: 1px solid var(--ct-resin-line);
      border-radius: 10px;
      background: var(--ct-resin-wash);
      color: var(--ct-resin-ink);
      font-weight: 600;
    }
    .problem {
      color: var(--ct-madder);
      font-size: 0.875rem;
      font-weight: 600;
    }
    .buttons {
      display: flex;
      flex-wrap: wrap;
      justify-content: flex-end;
      gap: 8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AskDialog {
  readonly question = input.required<Question>();
  readonly answered = output<Answer | null>();

  protected readonly longest = LONGEST_REASON;
  protected readonly text = signal('');
  protected readonly cautionRead = signal(false);
  protected readonly tried = signal(false);
  protected answer: Answer | null = null;
  private readonly dialog = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  constructor() {
    afterNextRender(() => this.dialog().nativeElement.showModal());
  }

  protected tooShort(): boolean {
    return this.text().trim().length < SHORTEST_REASON;
  }

  protected submit(event: Event): void {
    event.preventDefault();
    this.tried.set(true);
    const { needsReason, caution } = this.question();
    if ((needsReason && this.tooShort()) || (caution && !this.cautionRead())) return;
    this.answer = { reason: this.text().trim(), cautionRead: this.cautionRead() };
    this.dialog().nativeElement.close();
  }
}
