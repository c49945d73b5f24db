import { type InputSignal, type OutputEmitterRef, type Type } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';

type InputsOf<T> = { [K in keyof T as T[K] extends InputSignal<infer _> ? K : never]?: unknown };
type OutputsOf<T> = {
  [K in keyof T as T[K] extends OutputEmitterRef<infer _> ? K : never]?: (value: never) => void;
};

/** A component on a page, as somebody at the screen meets it: words to read and buttons to press. */
export class Rendered<T> {
  constructor(readonly fixture: ComponentFixture<T>) {}

  get element(): HTMLElement {
    return this.fixture.nativeElement as HTMLElement;
  }

  /** All words, with runs of space as one. */
  get text(): string {
    return toText(this.element);
  }

  textsOf(selector: string): string[] {
    return this.all(selector).map(toText);
  }

  all(selector: string): HTMLElement[] {
    return [...this.element.querySelectorAll<HTMLElement>(selector)];
  }

  /** The button or link of a name, as assistive technology has it. */
  find(name: string): HTMLElement {
    const found = this.all('button, a, summary').find(
      (one) => (one.getAttribute('aria-label') ?? toText(one)) === name,
    );
    if (!found) throw new Error(`Nothing to press is called '${name}' in: ${this.text}`);
    return found;
  }

  async press(name: string): Promise<void> {
    this.find(name).click();
    await this.settle();
  }

  /** Chooses or types in the field that a selector finds. */
  async enter(selector: string, value: string): Promise<void> {
    const field = this.element.querySelector<HTMLInputElement | HTMLSelectElement>(selector);
    if (!field) throw new Error(`There is no field ${selector}.`);
    field.value = value;
    field.dispatchEvent(new Event('input'));
    field.dispatchEvent(new Event('change'));
    await this.settle();
  }

  async set(inputs: InputsOf<T>): Promise<void> {
    for (const [name, value] of Object.entries(inputs)) this.fixture.componentRef.setInput(name, value);
    await this.settle();
  }

  settle(): Promise<unknown> {
    return this.fixture.whenStable();
  }
}

/** Draws a component with inputs, and listens to outputs. */
export async function render<T>(
  type: Type<T>,
  inputs: InputsOf<T> = {},
  outputs: OutputsOf<T> = {},
): Promise<Rendered<T>> {
  const fixture = TestBed.createComponent(type);
  for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
  for (const [name, listen] of Object.entries(outputs)) {
    const output = fixture.componentInstance[name as keyof T] as OutputEmitterRef<unknown>;
    output.subscribe(listen as (value: unknown) => void);
  }
  const rendered = new Rendered(fixture);
  await rendered.settle();
  return rendered;
}

/** The words of an element, those of neighbouring elements kept apart. */
function toText(element: HTMLElement): string {
  const walker = document.createTreeWalker(element, NodeFilter.SHOW_TEXT);
  const texts: string[] = [];
  while (walker.nextNode()) texts.push(walker.currentNode.textContent ?? '');
  return texts.join(' ').replace(/\s+/g, ' ').trim();
}
