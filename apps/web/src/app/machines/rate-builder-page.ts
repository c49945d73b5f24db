import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource, toSignal, toObservable } from '@angular/core/rxjs-interop';
import { FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { Router, RouterLink } from '@angular/router';
import { type Machine, type MachineBuiltRateInput, type MachineRate } from '@brakeven/contract';
import { LoadingSkeleton, PageHeader, RatePipe } from '@brakeven/ui';
import { D, parseRate, rateText, sum, todayIn, toRate } from '@brakeven/values';
import { map, startWith, switchMap } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { FormField } from '../forms/form-field';
import { guardUnsaved } from '../forms/guard-unsaved';
import { type Leavable } from '../forms/leave-guard';
import { parsedBy, showIssues } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { findCurrentRate } from '../rates/current-rate';
import { toRateText } from '../rates/to-rate-text';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { AREA_UNITS, computeRate, createBasisForm, readBasis } from './basis-form';
import { RateParts } from './rate-parts';
import { RecoveryCard } from './recovery-card';

/** Builds a machine-hour rate from what the machine costs: inputs beside the rate that they give, part by part. */
@Component({
  selector: 'app-rate-builder-page',
  imports: [
    FormField,
    LoadError,
    LoadingSkeleton,
    PageHeader,
    RateParts,
    RatePipe,
    ReactiveFormsModule,
    RecoveryCard,
    RouterLink,
  ],
  templateUrl: './rate-builder-page.html',
  styleUrl: './rate-builder-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RateBuilderPage implements Leavable {
  readonly machineId = input.required<string>();
  /** The rate to build anew, from the address; absent for a new one. */
  readonly rate = input<string>();

  private readonly api = inject(MachinesApi);
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly router = inject(Router);

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly canEdit = computed(() => this.session.can('machines.edit'));
  protected readonly today = computed(() => todayIn(this.session.shopFormat().timeZone));
  protected readonly currency = computed(() => this.session.shopFormat().currency);
  protected readonly areaUnit = computed(() => AREA_UNITS[this.session.shopFormat().units]);
  protected readonly round = signal(0);
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<ShownProblem | null>(null);

  /** The rate that is built anew; a new one begins with what the latest was built from. */
  private readonly own = computed(() => this.find(({ machineRateId }) => machineRateId === this.rate()));
  private readonly pattern = computed(() => this.own() ?? this.find(({ basis }) => basis !== null));
  protected readonly form = linkedSignal(() => this.createForm());
  private readonly changes = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) =>
        form.valueChanges.pipe(
          startWith(null),
          map(() => form.getRawValue()),
        ),
      ),
    ),
  );
  protected readonly basis = computed(() => {
    const texts = this.changes();
    return texts ? readBasis(texts.basis, this.session.shopFormat().units) : null;
  });
  protected readonly built = computed(() => {
    const basis = this.basis();
    return basis && computeRate(basis);
  });
  /** Power, consumables and upkeep: what an hour adds without the operator. */
  protected readonly suggestedRunningCost = computed(() => {
    const built = this.built();
    return built && rateText(toRate(sum([built.runningPerHour, built.parts.upkeep])));
  });
  protected readonly isCorrection = computed(() => this.own() !== undefined);

  readonly canLeave = guardUnsaved(() => this.form().dirty, 'What you changed in this rate is not saved.');

  protected takeSuggestion(rate: string): void {
    const { runningCostPerHour } = this.form().controls;
    runningCostPerHour.setValue(rate);
    runningCostPerHour.markAsDirty();
  }

  protected save(): void {
    const form = this.form();
    form.markAllAsTouched();
    const basis = this.basis();
    if (form.invalid || !basis || this.isSaving()) return this.focusFirstError();
    this.isSaving.set(true);
    this.problem.set(null);
    const { validFrom, chargeOutRate, runningCostPerHour } = form.getRawValue();
    const body: MachineBuiltRateInput = {
      validFrom,
      chargeOutRate: toRateText(chargeOutRate),
      runningCostPerHour: toRateText(runningCostPerHour),
      basis,
    };
    const own = this.own();
    const answer = own
      ? this.api.updateBuiltRate(this.machineId(), own.machineRateId, body)
      : this.api.addBuiltRate(this.machineId(), body);
    answer.subscribe({
      next: (machine) => this.finish(machine),
      error: (error: unknown) => this.refuse(toShownProblem(error)),
    });
  }

  private finish(machine: Machine): void {
    this.isSaving.set(false);
    this.form().markAsPristine();
    void this.rollup.refresh();
    this.notifier.say('The rate is saved. Costs of the days that it prices follow with the next rollup.');
    void this.router.navigate(['/machines', machine.machineId]);
  }

  private refuse(problem: ShownProblem): void {
    this.isSaving.set(false);
    showIssues(this.form(), problem.issues);
    this.problem.set(problem);
    this.focusFirstError();
  }

  private focusFirstError(): void {
    queueMicrotask(() =>
      document.querySelector<HTMLElement>('app-rate-builder-page input.ng-invalid')?.focus(),
    );
  }

  private find(isMeant: (rate: MachineRate) => boolean): MachineRate | undefined {
    return this.machine.hasValue() ? this.machine.value().rates?.find(isMeant) : undefined;
  }

  private createForm() {
    const machine = this.machine.hasValue() ? this.machine.value() : null;
    const [own, pattern] = [this.own(), this.pattern()];
    const current = machine?.rates && (findCurrentRate(machine.rates, this.today()) ?? machine.rates[0]);
    const others = own ?? current;
    const price = machine?.outlay && !D(machine.outlay).isZero() ? machine.outlay : '';
    return new FormGroup({
      validFrom: textControl(own?.validFrom ?? this.today(), Validators.required),
      chargeOutRate: textControl(others?.chargeOutRate, Validators.required, parsedBy(parseRate)),
      runningCostPerHour: textControl(others?.runningCostPerHour, Validators.required, parsedBy(parseRate)),
      basis: createBasisForm(pattern?.basis ?? null, this.session.shopFormat().units, price),
    });
  }
}
