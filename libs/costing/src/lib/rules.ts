/** The rules of costing in words, shown in the workings of each figure. */
export const RULES = {
  labour:
    'Hours × wage × (1 + burden), with the wage and burden valid on the work date, rounded half-up to the cent on each entry.',
  machine:
    "Hours × the machine-hour rate valid on the work date, for entries with a machine (the row's own, else the operation's default), rounded half-up to the cent on each entry.",
  overhead:
    'Hours × the overhead rate valid on the work date, for every entry on a job, rounded half-up to the cent on each entry.',
  earned:
    "Hours on the machine × the charge-out rate valid on the work date, for billable jobs, from the machine's in-service date, rounded half-up to the cent on each entry.",
  running:
    "Hours on the machine × its running cost per hour valid on the work date, billable or not, from the machine's in-service date, rounded half-up to the cent on each entry.",
  hours: 'The hours of the time entries, each counted once.',
  machineHours: 'The hours of the time entries that have a machine, each counted once.',
  jobTotal: 'Labour + machine + overhead; each is the sum of its lines.',
  operatorLabour:
    "The labour lines of all hours on the machine, billable or not, from the machine's in-service date.",
  runningCost: "Operator's labour + running lines of the machine, through the date given.",
  outlay:
    'The sum of the machine costs: price, freight, rigging, electrical work, tooling, installation, training and other.',
  earnedBack: 'Earned − running cost, added up day by day from the in-service date.',
  remaining: 'Outlay − earned back, and 0 once the outlay is covered.',
  pace: 'Earned − running cost of the last 182 days, or of the days in service if fewer, per week.',
  breakEvenReached: 'The first day on which earned back covers the outlay.',
  breakEvenStraightLine:
    'A straight line, not a forecast: what remains ÷ the daily pace of the last 182 days (or the days in service if fewer), rounded up to whole days after the last day costed.',
  breakEvenNotAtThisPace:
    'At the pace of the last 182 days the outlay is not covered within 20 years, so there is no date.',
  breakEvenNoData:
    'No date yet: it takes an outlay, an in-service date, and hours on the machine that have been rolled up.',
} as const;

/** The name of a rule. */
export type RuleName = keyof typeof RULES;
