/**
 * @param {import('./programs.mjs').DemoShop} demoShop
 * @returns {string} its sign-ins as a table, and the timesheet to try; a remark when there is no demo shop
 */
export function describeDemoShop({ signIns, timesheet }) {
  if (signIns.length === 0) {
    return 'Sign in with the e-mail address and password of your shop.\n';
  }
  const width = (/** @type {'role' | 'email'} */ key) =>
    Math.max(...signIns.map((signIn) => signIn[key].length));
  const lines = signIns.map(
    ({ role, email, password }) =>
      `  ${role.padEnd(width('role'))}  ${email.padEnd(width('email'))}  ${password}`,
  );
  const toTry = timesheet ? `\nA timesheet to try: ${timesheet}\n` : '';
  return `Sign-ins of the demo shop\n${lines.join('\n')}\n${toTry}`;
}
