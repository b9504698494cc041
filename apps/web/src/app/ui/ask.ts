import {
  ApplicationRef,
  createComponent,
  EnvironmentInjector,
  inject,
  Injectable,
} from '@angular/core';
import { AskDialog, type Answer, type Question } from './ask-dialog';

/** Asks a person before something is done: "are you sure", a written reason, a caution to be read. */
@Injectable({ providedIn: 'root' })
export class Ask {
  private readonly application = inject(ApplicationRef);
  private readonly environmentInjector = inject(EnvironmentInjector);

  /** Null when the person changed their mind. The focus goes back to where it was. */
  ask(question: Question): Promise<Answer | null> {
    const focused = document.activeElement;
    const { environmentInjector } = this;
    const dialog = createComponent(AskDialog, { environmentInjector });
    dialog.setInput('question', question);
    document.body.append(dialog.location.nativeElement as HTMLElement);
    this.application.attachView(dialog.hostView);
    return new Promise((resolve) => {
      dialog.instance.answered.subscribe((answer) => {
        dialog.destroy();
        if (focused instanceof HTMLElement && focused.isConnected) focused.focus();
        resolve(answer);
      });
    });
  }
}
