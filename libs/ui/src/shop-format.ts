import { InjectionToken, signal, type Signal } from '@angular/core';
import { type UnitSystem } from '@brakeven/values';

/** What the pipes need to know of the shop. */
export interface ShopFormat {
  currency: string;
  units: UnitSystem;
  timeZone: string;
}

/** The shop that figures are shown for; the web app provides it from the session. */
export const SHOP_FORMAT = new InjectionToken<Signal<ShopFormat>>('SHOP_FORMAT', {
  providedIn: 'root',
  factory: () => signal<ShopFormat>({ currency: 'USD', units: 'us', timeZone: 'UTC' }),
});
