// @vitest-environment happy-dom
import { cleanup, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Button } from '../actions/button';
import type { Problem } from '../api';
import { Form } from './form';
import { NumberField } from './number-field';
import { PasswordField } from './password-field';
import { RadioGroup } from './radio-group';
import { TextField } from './text-field';

afterEach(cleanup);

const refusal: Problem = {
  type: 'about:blank',
  title: 'Something in this request needs a change',
  status: 422,
  code: 'invalid',
  detail: 'One field needs another look.',
  fields: { name: 'Give the plot a name.' },
};

describe('Form', () => {
  it('hands over what was typed, by field name', async () => {
    const sent = vi.fn();
    render(
      <Form onSubmit={sent}>
        <TextField name="name" label="Plot name" />
        <RadioGroup
          name="ground"
          label="Ground"
          options={[
            { value: 'new', label: 'New' },
            { value: 'old', label: 'Old' },
          ]}
        />
        <Button type="submit">Save this plot</Button>
      </Form>,
    );
    await userEvent.type(screen.getByLabelText('Plot name'), 'North bed');
    await userEvent.click(screen.getByLabelText('Old'));
    await userEvent.click(screen.getByRole('button', { name: 'Save this plot' }));
    expect(sent).toHaveBeenCalledTimes(1);
    expect(sent.mock.calls[0]?.[0]).toEqual({ name: 'North bed', ground: 'old' });
  });

  it('says a refusal at the field and in a summary that leads there', async () => {
    const { rerender } = render(
      <Form onSubmit={() => undefined}>
        <TextField name="name" label="Plot name" hint="As on the bag." />
      </Form>,
    );
    rerender(
      <Form onSubmit={() => undefined} problem={refusal}>
        <TextField name="name" label="Plot name" hint="As on the bag." />
      </Form>,
    );
    const summary = screen.getByTestId('error-summary');
    expect(document.activeElement).toBe(summary);
    const field = screen.getByLabelText('Plot name');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    const described = (field.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => document.getElementById(id)?.textContent);
    expect(described).toEqual(['As on the bag.', 'Error: Give the plot a name.']);
    await userEvent.click(within(summary).getByText('Give the plot a name.'));
    expect(document.activeElement).toBe(field);
  });

  it('shows a refusal without fields in its own words', () => {
    const { fields: _fields, ...whole } = refusal;
    render(
      <Form onSubmit={() => undefined} problem={{ ...whole, detail: 'Somebody else saved first.' }}>
        <TextField name="name" label="Plot name" />
      </Form>,
    );
    expect(screen.getByTestId('error-summary').textContent).toContain('Somebody else saved first.');
  });
});

describe('NumberField', () => {
  it('takes a decimal comma and says what it understood', async () => {
    const heard = vi.fn();
    render(<NumberField name="ph" label="pH" onNumber={heard} />);
    const field = screen.getByLabelText('pH');
    expect(field.getAttribute('type')).toBe('text');
    expect(field.getAttribute('inputmode')).toBe('decimal');
    await userEvent.type(field, '6,4');
    expect(heard).toHaveBeenLastCalledWith('6.4');
    expect(screen.getByText('Read as 6.4.')).toBeDefined();
  });

  it('hears nothing while there is no number', async () => {
    const heard = vi.fn();
    render(<NumberField name="ph" label="pH" onNumber={heard} />);
    await userEvent.type(screen.getByLabelText('pH'), 'x');
    expect(heard).toHaveBeenLastCalledWith(null);
  });

  it('offers a keyboard with a minus sign where the number may be below zero', () => {
    render(<NumberField name="change" label="Change" signed />);
    expect(screen.getByLabelText('Change').getAttribute('inputmode')).toBe('text');
  });
});

describe('PasswordField', () => {
  it('[E 6] shows and hides the letters without losing them', async () => {
    render(<PasswordField name="password" label="Password" autoComplete="new-password" />);
    const field = screen.getByLabelText('Password');
    await userEvent.type(field, 'four words in a row');
    const show = screen.getByRole('button', { name: 'Show password' });
    await userEvent.click(show);
    expect(field.getAttribute('type')).toBe('text');
    expect(show.getAttribute('aria-pressed')).toBe('true');
    await userEvent.click(show);
    expect(field.getAttribute('type')).toBe('password');
    expect(field).toHaveProperty('value', 'four words in a row');
  });

  it('[E 6] takes a pasted password whole and tells managers what it is for', async () => {
    render(<PasswordField name="password" label="Password" autoComplete="current-password" />);
    const field = screen.getByLabelText('Password');
    await userEvent.click(field);
    await userEvent.paste('ｐａｓｔｅ "me" 🙂 whole, 8 words or 80');
    expect(field).toHaveProperty('value', 'ｐａｓｔｅ "me" 🙂 whole, 8 words or 80');
    expect(field.getAttribute('autocomplete')).toBe('current-password');
    expect(field.hasAttribute('maxlength')).toBe(false);
  });
});
