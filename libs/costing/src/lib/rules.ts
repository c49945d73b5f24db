/** The rules of costing in words, shown in the workings of each figure. */
export const RULES = {
  labour:
    'Hours × wage × (1 + burden), with the wage and burden valid on the work date, rounded half-up to the cent on each entry.',
  overtime:
    "Hours above the week's threshold earn a premium of ½ × the regular rate of the week (its straight-time pay without burden ÷ its hours), rounded half-up to the cent for the week and shared out over its entries by hours, to overhead or to their jobs as the shop chose. State and local rules differ, and payroll decides.",
  machine:
    "Hours × the machine-hour rate valid on the work date, for entries with a machine (the row's own, else the operation's default), rounded half-up to the cent on each entry.",
  overhead:
    'Hours × the overhead rate valid on the work date, for every entry on a job, rounded half-up to the cent on each entry.',
  material:
    'Weight × the moving average of its moment (value of the stock ÷ its weight), rounded half-up to the cent on each issue; what empties the stock takes all its value, and returns come back at the average of theirs and count below 0.',
  outside: 'The amounts of the outside services on the job, as entered.',
  invoiced: 'The amounts of the invoices on the job, less its credit notes, as entered.',
  earned:
    "Hours on the machine × the charge-out rate valid on the work date, for billable jobs, from the machine's in-service date, rounded half-up to the cent on each entry.",
  running:
    "Hours on the machine × its running cost per hour valid on the work date, billable or not, from the machine's in-service date, rounded half-up to the cent on each entry.",
  hours: 'The hours of the time entries, each counted once.',
  machineHours: 'The hours of the time entries that have a machine, each counted once.',
  jobTotal: 'Labour + overtime + machine + overhead + material + outside; each is the sum of its lines.',
  margin: 'Invoiced − total cost; provisional until the job is finished, since costs may still come.',
  workInProgress:
    'Total cost − invoiced of billable jobs that are open or finished, and 0 where more is invoiced than was spent.',
  posting:
    'What comes late for a closed month is posted on the first day that is open, at the rates of its own date, and marked late; what was posted in a closed month is taken back there by lines that count against it.',
  stock:
    'Landed cost of the lots − issues + returns, in order of date, lots first on their day; the average is the value ÷ the weight in stock.',
  landedLotCost: 'Price of the lot + freight.',
  materialWeight:
    'Pieces × length × width × thickness × density, or the weight as given; kilograms, ten decimals.',
  machineHourRate:
    'Depreciation + interest + space + insurance + upkeep of a year ÷ planned productive hours, + power + consumables of an hour; parts to six decimals, their sum half-up to the cent.',
  rateDepreciation: 'Straight line: (price − salvage) ÷ life in years ÷ planned productive hours a year.',
  rateInterest:
    'Average capital, (price + salvage) ÷ 2, × interest a year ÷ planned productive hours a year.',
  rateSpace: 'Floor area × cost of space a year ÷ planned productive hours a year.',
  rateInsurance: 'Insurance a year ÷ planned productive hours a year.',
  rateUpkeep: 'Planned upkeep a year ÷ planned productive hours a year.',
  ratePower: 'Power × average load × tariff.',
  rateConsumables: 'Consumables per hour, as entered.',
  fixedCostOfPeriod: 'Fixed parts of a year × the days of the period ÷ the days of their calendar year.',
  recovery:
    'Hours really run × the fixed share of the rate − the fixed cost of the period: above 0 over-recovered, below 0 under-recovered.',
  depreciationStraightLine: 'Each period: (cost − salvage) ÷ life.',
  depreciationYearsDigits: 'In a period: (cost − salvage) × the periods left with it ÷ (1 + 2 + … + life).',
  depreciationDoubleDeclining: 'In a period: what is left × factor ÷ life, never below the salvage.',
  depreciationDeclining:
    'In a period: what is left × the rate 1 − (salvage ÷ cost)^(1 ÷ life), to three decimals; a first year that is not whole bears its months, one more at the end the rest.',
  depreciationUnits: 'In a period: (cost − salvage) × its units ÷ the units of the whole life.',
  estimateHours:
    'Set-up hours + pieces × minutes per piece ÷ 60 × (1 + scrap allowance), rounded half-up to four decimals.',
  estimateLabour:
    'Estimated hours × labour rate as used in the estimate, rounded half-up to the cent on each line.',
  estimateMachine:
    'Estimated hours × machine-hour rate as used in the estimate, for operations with a machine, rounded half-up to the cent on each line.',
  estimateOverhead:
    'Estimated hours × overhead rate as used in the estimate, rounded half-up to the cent on each line.',
  estimateOvertime: 'Nothing: an estimate expects no overtime.',
  estimateMaterial:
    'Weight × (1 + scrap allowance) × price as used in the estimate, rounded half-up to the cent on each line.',
  estimateOutside: 'The amounts of outside work in the estimate, as entered.',
  estimateTotal:
    'Labour + overtime + machine + overhead + material + outside of the estimate; each is the sum of its lines.',
  priceForMargin:
    'Estimated cost ÷ (1 − wanted margin), rounded up to the cent; the margin is a share of the price.',
  variance: 'Actual − estimate: above 0 it cost more than estimated. Rate part + quantity part, exactly.',
  variancePartRate:
    'Difference of the rates (actual − estimated) × actual quantity, a rate being amount ÷ quantity; all of it for outside work, which has no quantity.',
  variancePartQuantity:
    'Variance − rate part, which is (actual quantity − estimated quantity) × estimated rate; all of it where either quantity is missing.',
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
