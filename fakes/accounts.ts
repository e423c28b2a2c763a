/** The invented accounts of the local sign-in stand-in. None of them is a real person. */

export interface InventedAccount {
  readonly id: number;
  readonly login: string;
  readonly name: string;
  readonly email: string;
  readonly emailVerified: boolean;
  /** Said beside the account on the consent page. */
  readonly remark: string;
  /** This one always answers the question for consent with no. */
  readonly refusesConsent: boolean;
}

function account(
  id: number,
  login: string,
  name: string,
  remark: string,
  { emailVerified = true, refusesConsent = false } = {},
): InventedAccount {
  return { id, login, name, email: `${login}@example.org`, emailVerified, remark, refusesConsent };
}

export const inventedAccounts: readonly InventedAccount[] = [
  account(9001, "wren-lantern", "Wren Lantern", "writes the Lantern notebook"),
  account(9002, "otto-lantern", "Otto Lantern", "her co-author"),
  account(9003, "ines-tern", "Ines Tern", "from the neighbouring collaboration"),
  account(9004, "ravi-ledger", "Ravi Ledger", "reads and asks questions, as a referee does"),
  account(9005, "lena-newcomer", "Lena Newcomer", "has never been here before"),
  account(9006, "mika-unverified", "Mika Unverified", "has not verified the e-mail address", {
    emailVerified: false,
  }),
  account(9007, "nora-declines", "Nora Declines", "refuses consent", { refusesConsent: true }),
];
