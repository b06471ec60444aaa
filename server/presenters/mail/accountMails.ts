import { mailLayout } from './layout';

interface Mail {
  subject: string;
  text: string;
  html: string;
}

/** Asks a new person to confirm that the address is theirs. */
export function confirmEmailMail(input: { name: string; url: string }): Mail {
  return {
    subject: 'Confirm your e-mail address',
    ...mailLayout({
      title: 'Confirm your e-mail address',
      paragraphs: [
        `Hello ${input.name}, this address was given for a new Dapple account. Confirm it to sign in and set up your yard.`,
        'The link works once, for two days. If you did not ask for an account, do nothing: without the link there is none.',
      ],
      action: { label: 'Confirm and sign in', url: input.url },
    }),
  };
}

/** Tells the holder of an account that somebody signed up with their address again. */
export function addressTakenMail(input: { name: string; signInUrl: string }): Mail {
  return {
    subject: 'You have an account already',
    ...mailLayout({
      title: 'You have an account already',
      paragraphs: [
        `Hello ${input.name}, somebody just tried to sign up for Dapple with this address. You have an account already, and nothing about it was changed.`,
        'If that was you, sign in; a forgotten password can be set anew from there. If it was not you, there is nothing to do.',
      ],
      action: { label: 'Sign in', url: input.signInUrl },
    }),
  };
}

/** Carries the link with which a new password can be set. */
export function resetPasswordMail(input: { name: string; url: string }): Mail {
  return {
    subject: 'Set a new password',
    ...mailLayout({
      title: 'Set a new password',
      paragraphs: [
        `Hello ${input.name}, a new password was asked for on your Dapple account. Setting one signs you out everywhere.`,
        'The link works once, for one hour. If you did not ask for it, do nothing: your password stays as it is.',
      ],
      action: { label: 'Set a new password', url: input.url },
    }),
  };
}

/** Tells that the password is another one now, so that a stranger's change does not go unseen. */
export function passwordChangedMail(input: { name: string; forgotUrl: string }): Mail {
  return {
    subject: 'Your password was changed',
    ...mailLayout({
      title: 'Your password was changed',
      paragraphs: [
        `Hello ${input.name}, the password of your Dapple account was changed, and your other sessions were ended.`,
        'If that was not you, set a new password at once.',
      ],
      action: { label: 'Set a new password', url: input.forgotUrl },
    }),
  };
}

/** Last mail of an account that its owner deleted. */
export function accountDeletedMail(input: { name: string; yardNames: string[] }): Mail {
  return {
    subject: 'Your account was deleted',
    ...mailLayout({
      title: 'Your account was deleted',
      paragraphs: [
        `Hello ${input.name}, your Dapple account and what belonged to it were deleted, as you asked.`,
        ...(input.yardNames.length > 0 ? [`Deleted with it, since nobody else belonged to them: ${input.yardNames.join(', ')}.`] : []),
      ],
    }),
  };
}
