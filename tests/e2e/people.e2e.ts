import { describe, expect, test } from 'vitest';
import { PHONE, useBrowser } from '../support/browser';
import { assertAccessible } from '../support/browserAxe';
import { KEYBOARD, TOUCH } from '../support/browserHands';
import {
  button,
  field,
  followMail,
  go,
  heading,
  link,
  newAddress,
  PASSWORD,
  signIn,
  signUpByMailbox,
  takeFromMenu,
} from '../support/browserPeople';
import { newMail, stack } from '../support/browserStack';

const NEW_PASSWORD = 'three rows of winter leeks';

describe('People find their way in', () => {
  const { visitor } = useBrowser();

  test('from sign-up over the mailbox to a site, and a helper by invitation, who then chooses another password', async () => {
    const owner = { name: 'Ada Brook', email: newAddress('ada') };
    const helper = { name: 'Ben Stile', email: newAddress('ben') };

    const first = await visitor();
    await go(first.page, '/');
    await assertAccessible(first.page, 'the first page');
    await KEYBOARD.press(link(first.page, 'Start with your last report'));
    await heading(first.page, 'Make an account').or(heading(first.page, 'Sign up')).waitFor();
    await assertAccessible(first.page, 'sign-up');
    const page = await signUpByMailbox(first, KEYBOARD, owner);
    await assertAccessible(page, 'sign-in');
    await signIn(page, KEYBOARD, owner.email);
    await page.waitForURL('**/today');

    await go(page, '/new-site');
    await KEYBOARD.write(field(page, 'Name of the site'), 'Mill Lane');
    await KEYBOARD.press(button(page, 'Open the site'));
    await heading(page, 'Mill Lane').waitFor();
    const site = new URL(page.url()).pathname;

    await go(page, `${site}/members`);
    await KEYBOARD.write(field(page, 'E-mail address'), helper.email);
    await KEYBOARD.press(button(page, 'Send the invitation'));
    await page.getByRole('listitem').filter({ hasText: helper.email }).getByText('Waiting').waitFor();

    // The helper, on a phone, has no account yet.
    const second = await visitor({ viewport: PHONE, touch: true });
    const mailbox = second.page;
    await mailbox.goto(stack().mailbox);
    await followMail(mailbox, TOUCH, helper.email, /\/invitation\/[^?]+$/);
    await heading(mailbox, 'Join Mill Lane').waitFor();
    await assertAccessible(mailbox, 'invitation');
    await TOUCH.press(link(mailbox, 'Make an account and accept'));
    const phone = await signUpByMailbox(second, TOUCH, helper);
    await signIn(phone, TOUCH, helper.email);
    await heading(phone, 'Mill Lane').waitFor();
    expect(new URL(phone.url()).pathname).toBe(site);

    // A helper sees who belongs here, and has none of the owner's controls.
    await go(phone, `${site}/members`);
    await phone.getByText('Ada Brook').first().waitFor();
    for (const name of ['Send the invitation', /^Change the role/, 'Remove'])
      expect(await button(phone, name).count(), String(name)).toBe(0);
    await go(phone, site);
    await heading(phone, 'Mill Lane').waitFor();
    for (const name of ['Draw a plot', 'Add by numbers']) expect(await button(phone, name).count(), name).toBe(0);
    expect(await link(phone, 'Add the first plot').count()).toBe(0);

    // The old password ends with the new one, and so does every session.
    const third = await visitor();
    await go(third.page, '/sign-in');
    await KEYBOARD.press(link(third.page, 'I do not know my password'));
    await KEYBOARD.write(field(third.page, 'E-mail address'), helper.email);
    await KEYBOARD.press(button(third.page, 'Send the link'));
    await heading(third.page, 'Look for our mail').waitFor();
    await newMail(helper.email, /password/i);
    await third.page.goto(stack().mailbox);
    await followMail(third.page, KEYBOARD, helper.email, /\/reset\//);
    await heading(third.page, 'Choose a new password').waitFor();
    await assertAccessible(third.page, 'new password');
    await KEYBOARD.write(field(third.page, 'New password'), NEW_PASSWORD);
    await KEYBOARD.press(button(third.page, 'Set the new password'));
    await heading(third.page, 'The new password is set').or(third.page.getByText('The new password is set')).waitFor();
    third.expectAnswers(401);
    await signIn(third.page, KEYBOARD, helper.email, PASSWORD);
    await third.page.getByTestId('error-summary').waitFor();
    await signIn(third.page, KEYBOARD, helper.email, NEW_PASSWORD);
    await third.page.waitForURL('**/today');
    await go(phone, site);
    await heading(phone, 'Sign in').waitFor();
  });

  test('the back button after signing out shows the sign-in page and nothing of the site', async () => {
    const me = { name: 'Cleo Marsh', email: newAddress('cleo') };
    const one = await visitor();
    await go(one.page, '/sign-up');
    const page = await signUpByMailbox(one, KEYBOARD, me);
    await signIn(page, KEYBOARD, me.email);
    await page.waitForURL('**/today');
    await go(page, '/account');
    await heading(page, 'Your settings')
      .or(page.getByRole('heading', { level: 1 }))
      .first()
      .waitFor();
    await takeFromMenu(page, KEYBOARD, /^Cleo Marsh: your account/, 'Sign out');
    await page.getByText('You are signed out').waitFor();
    await page.goBack();
    await heading(page, 'Sign in').waitFor();
    expect(await page.getByText('Cleo Marsh').count()).toBe(0);
  });
});
