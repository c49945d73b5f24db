import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type FormingReference } from '@brakeven/contract';
import { FormingApi } from '../api/forming-api';
import { SessionStore } from '../session/session-store';
import { toBendMaterial } from './bend-material';
import { toPresses } from './press-tooling';

const NOTHING: FormingReference = {
  forceLinePercent: '80',
  machines: [],
  materials: [],
  gauges: [],
  punches: [],
  dies: [],
};

/** What the parts of Forming know of the shop: its materials, gauges, presses with tooling, and its line. */
@Injectable()
export class FormingStore {
  private readonly session = inject(SessionStore);
  private readonly api = inject(FormingApi);

  readonly reference = rxResource({ stream: () => this.api.getReference() });
  /** Nothing until it is loaded; the frame shows no part before. */
  readonly known = computed(() => (this.reference.hasValue() ? this.reference.value() : NOTHING));
  readonly materials = computed(() => this.known().materials.map(toBendMaterial));
  readonly presses = computed(() => toPresses(this.known()));
  readonly lineShare = computed(() => Number(this.known().forceLinePercent) / 100);
  readonly materialOptions = computed(() =>
    this.materials().map(({ code, name }) => ({ value: code, label: name })),
  );
  readonly facts = computed(() => ({
    materials: this.materials(),
    gauges: this.known().gauges,
    presses: this.presses(),
    lineShare: this.lineShare(),
    units: this.session.shopFormat().units,
  }));

  /** Loads all again after a tool or a figure has changed. */
  reload(): void {
    this.reference.reload();
  }
}
