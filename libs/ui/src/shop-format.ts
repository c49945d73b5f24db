import { InjectionToken, signal, type WritableSignal } from '@angular/core';
import { type UnitSystem } from '@brakeven/values';

/** What the pipes need to know of the shop. */
export interface ShopFormat {
  currency: string;
  units: UnitSystem;
  timeZone: string;
}

/** The shop that figures are shown for; the web app sets it once it knows who is signed in. */
export const SHOP_FORMAT = new InjectionToken<WritableSignal<ShopFormat>>('SHOP_FORMAT', {
  providedIn: 'root',
  factory: () => signal<ShopFormat>({ currency: 'USD', units: 'us', timeZone: 'UTC' }),
});
