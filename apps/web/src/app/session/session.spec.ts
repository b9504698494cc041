import { TestBed } from '@angular/core/testing';
import { Router } from '@angular/router';
import { Apollo } from 'apollo-angular';
import { of, Subject } from 'rxjs';
import { LostSession } from '../graphql/lost-session';
import { safeNext } from './session-guard';
import { GO_TO, Session } from './session';

const VIEWER = {
  email: 'ines@example.com',
  member: { id: 'm1', name: 'Ines', initials: 'IR', roles: ['MAKER'] },
  shop: { id: 's1', name: 'Shop', zone: 'Europe/Vienna', lengthUnit: 'MILLIMETRE', isDemo: true },
  shops: [],
};

async function signedIn(mutate: () => unknown) {
  const went: string[] = [];
  let asked = 0;
  const query = () => {
    asked += 1;
    return of({ data: { now: '2026-12-01T13:06:00Z', viewer: VIEWER } });
  };
  TestBed.configureTestingModule({
    providers: [
      { provide: Apollo, useValue: { query, mutate } },
      { provide: Router, useValue: { url: '/floor?late=1' } },
      { provide: GO_TO, useValue: (address: string) => went.push(address) },
    ],
  });
  const session = TestBed.inject(Session);
  await Promise.all([session.find(), session.find()]);
  return { session, went, asked: () => asked, lost: TestBed.inject(LostSession) };
}

describe('Session', () => {
  it('asks the server once, however many ask it', async () => {
    const { session, asked } = await signedIn(() => of({ data: {} }));
    await session.find();
    expect(asked()).toBe(1);
    expect([session.may('overrideHolds'), session.may('manageShop')]).toEqual([true, false]);
  });

  it('goes to sign in, and back afterwards, when the session is lost', async () => {
    const { went, lost } = await signedIn(() => of({ data: {} }));
    lost.tell();
    lost.tell();
    expect(went).toEqual(['/sign-in?next=%2Ffloor%3Flate%3D1&ended=1']);
  });

  it('does not take signing out for a lost session when the socket hears of it first', async () => {
    const answer = new Subject<unknown>();
    const { session, went, lost } = await signedIn(() => answer);
    const out = session.signOut();
    lost.tell();
    answer.next({ data: { signOut: true } });
    await out;
    expect(went).toEqual(['/sign-in']);
  });

  it('stays, and says why, when another shop is refused', async () => {
    const refused = { switchShop: { problems: [{ sentence: 'You are not in this shop.' }] } };
    const { session, went } = await signedIn(() => of({ data: refused }));
    await expect(session.switchShop('s2')).rejects.toThrow('You are not in this shop.');
    expect(went).toEqual([]);
  });
});

describe('safeNext', () => {
  it.each(['/floor', '/orders?status=READY'])('follows %s', (next) => {
    expect(safeNext(next)).toBe(next);
  });

  it.each(['//elsewhere.example.com', '/\\elsewhere.example.com', 'https://example.com', '', null])(
    'does not follow %s',
    (next) => {
      expect(safeNext(next)).toBeNull();
    },
  );
});
