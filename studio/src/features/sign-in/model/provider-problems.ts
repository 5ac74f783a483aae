/** Why signing in at the provider ended on the sign-in page, by the code in its address. */
export const providerProblems: Record<string, string> = {
  PROVIDER_FAILED: 'The sign-in at your company was not finished. Try again, or sign in with a password.',
  ACCOUNT_NOT_PROVEN:
    'An account has this e-mail, but nothing has shown yet that the address is yours. Sign in with its password, or set a new one by mail.',
  EMAIL_NOT_VERIFIED: 'Your company has not confirmed the e-mail of your account there. Sign in with a password.',
};
