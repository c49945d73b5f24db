import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type MachineCostItem, type MachineCostItemInput, type MachineCostKind } from '@brakeven/contract';
import { moneyText, parseMoney } from '@brakeven/values';
import { MachinesApi } from '../api/machines-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { COST_KIND_OPTIONS } from './machine-words';

export interface CostItemDialogData {
  machineId: string;
  /** Absent for a new one. */
  item: MachineCostItem | null;
  today: string;
}

/** Adds a part of the landed cost or corrects one. */
@Component({
  selector: 'app-cost-item-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.item ? 'Correct a cost' : 'Add to the landed cost'"
      [submitLabel]="data.item ? 'Save' : 'Add cost'"
      [form]="form"
      [save]="save"
    >
      <app-form-field label="Date" type="date" [control]="form.controls.incurredOn" />
      <app-form-field label="Kind" [options]="kinds" [control]="form.controls.kind" />
      <app-form-field class="wide" label="Description" [control]="form.controls.description" />
      <app-form-field class="wide" label="Amount" [isNumber]="true" [control]="form.controls.amount" />
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CostItemDialog {
  protected readonly data = inject<CostItemDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(MachinesApi);
  protected readonly kinds = COST_KIND_OPTIONS;

  protected readonly form = new FormGroup({
    incurredOn: textControl(this.data.item?.incurredOn ?? this.data.today, Validators.required),
    kind: textControl(this.data.item?.kind ?? 'price', Validators.required),
    description: textControl(this.data.item?.description, Validators.maxLength(300)),
    amount: textControl(this.data.item?.amount, Validators.required, parsedBy(parseMoney)),
  });

  protected readonly save = () => {
    const { machineId, item } = this.data;
    const input = this.toInput();
    return item
      ? this.api.updateCostItem(machineId, item.machineCostItemId, input)
      : this.api.addCostItem(machineId, input);
  };

  private toInput(): MachineCostItemInput {
    const value = this.form.getRawValue();
    const amount = parseMoney(value.amount);
    return {
      incurredOn: value.incurredOn,
      kind: value.kind as MachineCostKind,
      description: value.description,
      amount: amount.ok ? moneyText(amount.value) : value.amount,
    };
  }
}
