/** A clock that stands still until a test moves it. */
export class TestClock {
  constructor(private at: number) {}

  /** As servers ask for it. */
  readonly now = (): Date => new Date(this.at);

  /** The instant so many minutes ago, as the API takes it. */
  ago(minutes: number): string {
    return new Date(this.at - minutes * 60_000).toISOString();
  }

  pass(minutes: number): void {
    this.at += minutes * 60_000;
  }
}
