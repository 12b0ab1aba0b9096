import { expect, test } from "vitest";
import { isCommonPassword, passwordLength, passwordProblem } from "./password-rules";

const about = { email: "aske.holm@riders.example", name: "Aske Holm" };

// Twenty of those that published lists of leaked passwords put first (OWASP ASVS 5.0, 6.2.4).
test.each([
  "password",
  "12345678",
  "123456789",
  "1234567890",
  "baseball",
  "football",
  "qwertyuiop",
  "superman",
  "1qaz2wsx",
  "trustno1",
  "iloveyou",
  "sunshine",
  "princess",
  "starwars",
  "computer",
  "michelle",
  "corvette",
  "password1",
  "11111111",
  "PassWord",
])("refuses %s, which is among the first to be tried", (password) => {
  expect(isCommonPassword(password)).toBe(true);
  expect(passwordProblem(password, about)).toMatch(/most common/);
});

test.each(["jammerbugt-west-17", "three gulls over the pier", "correct horse battery staple", "zxq8#Lm2"])(
  "takes %s",
  (password) => {
    expect(passwordProblem(password, about)).toBeNull();
  },
);

// OWASP ASVS 5.0, 6.2.1 (at least 8), 6.2.9 (at least 64 allowed), 6.2.5 (no rules about kinds of characters).
test.each([
  [7, /at least 8/],
  [8, null],
  [64, null],
  [128, null],
  [129, /at most 128/],
])("of %i characters the length is judged as the standard says", (length, answer) => {
  const problem = passwordProblem("gull wing ".repeat(20).slice(0, length), about);
  if (answer === null) expect(problem).toBeNull();
  else expect(problem).toMatch(answer);
});

test("counts an emoji, and a letter with its accent, as one character", () => {
  expect(passwordLength("🌊🌊🌊🌊🌊🌊🌊")).toBe(7);
  expect(passwordLength("e\u0301")).toBe(1);
  expect(passwordProblem("🌊🌊🌊🌊🌊🌊🌊", about)).toMatch(/at least 8/);
});

test.each(["aske.holm@riders.example", "AskeHolm", "askeholm1987", "trimwake2026", "Trimwake-Trimwake"])(
  "refuses %s, which anybody who knows the account tries first",
  (password) => {
    expect(passwordProblem(password, about)).not.toBeNull();
  },
);

test("asks for a password where none is given", () => {
  expect(passwordProblem("", about)).toBe("Enter a password.");
});
