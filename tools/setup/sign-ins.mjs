/**
 * @param {import('./programs.mjs').SignIn[]} signIns
 * @returns {string} a table of the demo shop's sign-ins; a remark when there are none
 */
export function describeSignIns(signIns) {
  if (signIns.length === 0) {
    return 'Sign in with the e-mail address and password of your shop.\n';
  }
  const width = (/** @type {'role' | 'email'} */ key) =>
    Math.max(...signIns.map((signIn) => signIn[key].length));
  const lines = signIns.map(
    ({ role, email, password }) =>
      `  ${role.padEnd(width('role'))}  ${email.padEnd(width('email'))}  ${password}`,
  );
  return `Sign-ins of the demo shop\n${lines.join('\n')}\n`;
}
