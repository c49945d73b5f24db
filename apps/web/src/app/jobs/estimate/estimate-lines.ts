import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  output,
} from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { type EstimateChoices } from '@brakeven/contract';
import { HoursPipe, MoneyPipe, SHOP_FORMAT } from '@brakeven/ui';
import { findFieldError } from '../../forms/parsed-by';
import { type EstimatePreview } from './estimate-cost';
import {
  FIELD_WORDS,
  type LineForm,
  type LineKind,
  type LineTexts,
  massUnit,
  toPriceText,
} from './estimate-form';

interface Field {
  name: keyof LineTexts;
  header: string;
  width: string;
  isNumber: boolean;
}

const number = (name: keyof LineTexts, header: string, width: string): Field => ({
  name,
  header,
  width,
  isNumber: true,
});

const FIELDS: Readonly<Record<LineKind, readonly Field[]>> = {
  operation: [
    { name: 'operationId', header: 'Operation', width: '130px', isNumber: false },
    { name: 'machineId', header: 'Machine', width: '130px', isNumber: false },
    number('setupHours', 'Set-up h', '74px'),
    number('minutesPerPiece', 'Min a piece', '74px'),
    number('pieces', 'Pieces', '74px'),
    number('labourRate', 'Labour /h', '84px'),
    number('machineHourRate', 'Machine /h', '84px'),
    number('overheadRate', 'Overhead /h', '84px'),
  ],
  material: [
    { name: 'materialId', header: 'Material', width: '220px', isNumber: false },
    number('weight', 'Weight', '110px'),
    number('price', 'Price', '110px'),
    { name: 'description', header: 'Note', width: '220px', isNumber: false },
  ],
  outside: [
    { name: 'description', header: 'What', width: '320px', isNumber: false },
    number('amount', 'Amount', '120px'),
  ],
};

const ADD_WORDS: Readonly<Record<LineKind, string>> = {
  operation: 'Add operation',
  material: 'Add material',
  outside: 'Add outside work',
};

/** The lines of one kind: typed like a sheet, Enter goes down and adds a line at the foot, Alt with arrows moves one. */
@Component({
  selector: 'app-estimate-lines',
  imports: [HoursPipe, MoneyPipe, ReactiveFormsModule],
  templateUrl: './estimate-lines.html',
  styleUrl: './estimate-lines.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EstimateLines {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly format = inject(SHOP_FORMAT);

  readonly kind = input.required<LineKind>();
  readonly heading = input.required<string>();
  /** Lines of this kind in their order. */
  readonly lines = input.required<readonly LineForm[]>();
  readonly choices = input.required<EstimateChoices>();
  readonly costs = input.required<ReadonlyMap<LineForm, EstimatePreview['lines'][number]>>();

  readonly added = output();
  readonly removed = output<LineForm>();
  readonly moved = output<{ line: LineForm; by: -1 | 1 }>();

  protected readonly addWord = computed(() => ADD_WORDS[this.kind()]);
  protected readonly fields = computed(() => {
    const unit = massUnit(this.format().units);
    return FIELDS[this.kind()].map((field) => {
      if (field.name === 'weight') return { ...field, header: `Weight, ${unit}` };
      return field.name === 'price' ? { ...field, header: `Price per ${unit}` } : field;
    });
  });
  protected readonly hasHours = computed(() => this.kind() === 'operation');

  protected optionsOf(field: keyof LineTexts): readonly { id: string; name: string }[] | null {
    const { operations, machines, materials } = this.choices();
    if (field === 'operationId') return operations;
    if (field === 'machineId') return machines;
    return field === 'materialId' ? materials : null;
  }

  /** A choice brings the rates that hold on the day of the estimate; where none holds the field is left to be typed. */
  protected takeDefaults(line: LineForm, field: keyof LineTexts): void {
    const { operationId, machineId, machineHourRate, materialId, price } = line.controls;
    const choices = this.choices();
    if (field === 'operationId') {
      const operation = choices.operations.find(({ id }) => id === operationId.value);
      machineId.setValue(operation?.defaultMachineId ?? '');
    }
    if (field === 'operationId' || field === 'machineId') {
      const machine = choices.machines.find(({ id }) => id === machineId.value);
      machineHourRate.setValue(machine?.machineHourRate ?? '');
    }
    if (field === 'materialId') {
      const material = choices.materials.find(({ id }) => id === materialId.value);
      price.setValue(material?.averagePerKg ? toPriceText(material.averagePerKg, this.format().units) : '');
    }
  }

  protected isWrong(line: LineForm, field: keyof LineTexts): boolean {
    const control = line.controls[field];
    return control.invalid && control.touched;
  }

  /** What is wrong with a line, field by field. */
  protected problemsOf(line: LineForm): string[] {
    const fields = this.fields().filter(({ name }) => this.isWrong(line, name));
    const words = fields.map(
      ({ name }) => `${FIELD_WORDS[name]}: ${findFieldError(line.controls[name]) ?? ''}`,
    );
    const whole = line.touched ? findFieldError(line) : null;
    return whole && line.errors ? [...words, whole] : words;
  }

  protected pressKey(event: KeyboardEvent, row: number, column: number): void {
    const line = this.lines()[row];
    if (!line) return;
    if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) {
      event.preventDefault();
      const by = event.key === 'ArrowUp' ? -1 : 1;
      this.moved.emit({ line, by });
      this.focus(row + by, column);
    } else if (event.key === 'Enter' && !event.ctrlKey && !event.metaKey) {
      event.preventDefault();
      const isLast = row === this.lines().length - 1;
      if (isLast) this.added.emit();
      this.focus(row + 1, isLast ? 0 : column);
    }
  }

  protected add(): void {
    const row = this.lines().length;
    this.added.emit();
    this.focus(row, 0);
  }

  /** After the rows are drawn. */
  private focus(row: number, column: number): void {
    setTimeout(() => {
      const cells = this.host.nativeElement.querySelectorAll<HTMLElement>('tr.line');
      cells[row]?.querySelectorAll<HTMLElement>('input, select')[column]?.focus();
    });
  }
}
