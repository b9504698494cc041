import type { RouteStep, StepTake, WaitStep, WorkStep } from './route';

/** A glue, in the figures that routes need. Minutes are elapsed. */
export interface GlueProfile {
  key: string;
  kind: 'GLUE';
  name: string;
  isDefault: boolean;
  note: string;
  openMinutes: number;
  clampedMinutes: number;
  /** From spreading until the joint may be machined. */
  machiningMinutes: number;
  lowestTenthsC: number;
  referenceTenthsC: number;
  /** Gram for each square metre of joint. */
  spreadGramsPerSquareMetre: number;
  pressureKilopascal: number;
}

/** A finish, in the figures that routes need. Minutes are elapsed. */
export interface FinishProfile {
  key: string;
  kind: 'FINISH';
  name: string;
  isDefault: boolean;
  note: string;
  /** Whether it hardens; an oil that does not has no full cure. */
  drying: boolean;
  soakMinutes: number;
  /** The latest that a coat may be wiped; null when it does not set. */
  wipeByMinutes: number | null;
  dwellMinutes: number;
  coats: number;
  fullCureMinutes: number;
  referenceTenthsC: number;
}

export type Profile = GlueProfile | FinishProfile;

/** A figure of a wait: the shop's own, or one that the glue's or finish's profile gives. */
export type Figure =
  | { minutes: number | null }
  | { glue: 'clampedMinutes' | 'machiningMinutes' | 'openMinutes' }
  | { finish: 'soakMinutes' | 'wipeByMinutes' | 'dwellMinutes' | 'fullCureMinutes' };

export type TemplateWait = Omit<
  WaitStep,
  'minMinutes' | 'maxMinutes' | 'source' | 'referenceTenthsC'
> & { min: Figure; max: Figure };

/** A step of the shop's route. Steps marked `perCoat` stand once for each coat of the finish, "#" being its number. */
export type TemplateStep = (WorkStep | TemplateWait) & { perCoat?: true; dryingOnly?: true };

/** The shop's route as people edit it, before a batch's glue and finish give it their figures. */
export interface RouteTemplate {
  isDefault: boolean;
  note: string;
  steps: readonly TemplateStep[];
}

/** The steps of a batch's own route: the template with the figures of a glue and a finish. */
export function resolveRoute(
  template: RouteTemplate,
  glue: GlueProfile,
  finish: FinishProfile,
): RouteStep[] {
  const steps = template.steps.filter((step) => !step.dryingOnly || finish.drying);
  const resolved: RouteStep[] = [];
  let coats: TemplateStep[] = [];
  const layCoats = () => {
    for (let coat = 1; coat <= (coats.length > 0 ? finish.coats : 0); coat++) {
      for (const step of coats) {
        // The last coat is not followed by a wait for another.
        if (step.kind === 'WAIT' && step.hold === 'DWELL' && coat === finish.coats) continue;
        resolved.push(withFigures(numbered(step, coat), glue, finish));
      }
    }
    coats = [];
  };
  for (const step of steps) {
    if (step.perCoat) {
      coats.push(step);
    } else {
      layCoats();
      resolved.push(withFigures(numbered(step, finish.coats), glue, finish));
    }
  }
  layCoats();
  return resolved;
}

function numbered(step: TemplateStep, coat: number): TemplateStep {
  const fill = (text: string) => text.replaceAll('#', String(coat));
  const base = { ...step, key: fill(step.key), name: fill(step.name) };
  if (base.kind === 'WAIT') return { ...base, after: fill(base.after) };
  const takes: StepTake[] = base.takes.map((take) => ({ ...take, until: fill(take.until) }));
  return { ...base, takes };
}

function withFigures(step: TemplateStep, glue: GlueProfile, finish: FinishProfile): RouteStep {
  const { perCoat: _perCoat, dryingOnly: _dryingOnly, ...rest } = step;
  if (rest.kind === 'WORK') return rest;
  const { min, max, ...wait } = rest;
  const profile =
    'glue' in min || 'glue' in max ? glue : 'finish' in min || 'finish' in max ? finish : null;
  return {
    ...wait,
    minMinutes: figure(min, glue, finish) ?? 0,
    maxMinutes: figure(max, glue, finish),
    source: profile?.name ?? 'the shop',
    referenceTenthsC: profile?.referenceTenthsC ?? null,
  };
}

function figure(of: Figure, glue: GlueProfile, finish: FinishProfile): number | null {
  if ('glue' in of) return glue[of.glue];
  if ('finish' in of) return finish[of.finish];
  return of.minutes;
}
