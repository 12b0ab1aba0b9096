/** A person of the demo club; all invented. */
export type DemoAccount = {
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly role: string;
};

/** Shared by the seed, the line the demo command prints, and the list on the sign-in page in demo mode. */
export const demoAccounts: readonly DemoAccount[] = [
  {
    name: "Runa Lindqvist",
    email: "runa@vestpynt.example",
    password: "jammerbugt-west-17",
    role: "Rider",
  },
  {
    name: "Odd Vestergaard",
    email: "odd@vestpynt.example",
    password: "jammerbugt-west-17",
    role: "Rider and coach",
  },
  {
    name: "Maren Toft",
    email: "maren@vestpynt.example",
    password: "jammerbugt-west-17",
    role: "Club admin",
  },
];
