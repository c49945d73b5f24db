import { canBypassTenancy, type Database, findServerVersion, listTotalMismatches } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';

/** One thing that was looked at, and whether it is as it should be. */
export interface Finding {
  subject: string;
  isGood: boolean;
  message: string;
}

const SERVER_VERSION_MIN = 15;

/** Looks at the server and at the application's role. */
export async function examineDatabase(db: Database): Promise<Finding[]> {
  const version = await findServerVersion(db);
  const isNewEnough = Number.parseInt(version, 10) >= SERVER_VERSION_MIN;
  const bypasses = await canBypassTenancy(db);
  return [
    {
      subject: 'PostgreSQL',
      isGood: isNewEnough,
      message: isNewEnough ? version : `${version}; at least ${SERVER_VERSION_MIN} is needed`,
    },
    {
      subject: 'Tenancy',
      isGood: !bypasses,
      message: bypasses
        ? 'the role of DATABASE_URL gets round row-level security; connect as brakeven_app'
        : 'row-level security binds the application',
    },
  ];
}

/** Holds a shop's cost lines against the totals of days that are kept beside them. */
export async function examineBooks(context: ShopContext): Promise<Finding[]> {
  const subject = `Totals of ${context.shop.name}`;
  const mismatches = await inShopOf(context, listTotalMismatches);
  if (mismatches.length === 0) return [{ subject, isGood: true, message: 'days and cost lines agree' }];
  return mismatches.map(({ total, ofLines, ofDays }) => ({
    subject,
    isGood: false,
    message: `${total}: lines make ${ofLines}, days ${ofDays}; run rollup --full`,
  }));
}
