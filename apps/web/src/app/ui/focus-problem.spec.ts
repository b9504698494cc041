import { ChangeDetectionStrategy, Component, inject, Injector, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { focusFirstProblem } from './focus-problem';

@Component({
  template: `
    <input id="right" [attr.aria-invalid]="false" />
    <input id="wrong" [attr.aria-invalid]="wrong()" />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Form {
  readonly injector = inject(Injector);
  readonly wrong = signal(false);
}

describe('focusFirstProblem', () => {
  it('takes the person to the first field with a problem, once it is shown', async () => {
    const fixture = TestBed.createComponent(Form);
    const element = fixture.nativeElement as HTMLElement;
    document.body.append(element);
    await fixture.whenStable();
    fixture.componentInstance.wrong.set(true);
    focusFirstProblem(element, fixture.componentInstance.injector);
    await fixture.whenStable();
    expect(document.activeElement?.id).toBe('wrong');
  });

  it('does nothing once the page has been left', async () => {
    const fixture = TestBed.createComponent(Form);
    const { injector } = fixture.componentInstance;
    await fixture.whenStable();
    fixture.destroy();
    expect(() => focusFirstProblem(document.body, injector)).not.toThrow();
  });
});
