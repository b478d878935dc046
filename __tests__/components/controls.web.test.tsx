import { fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { Button } from '../../components/ui/button';
import { DimensionSlider } from '../../components/ui/dimension-slider';
import { Field } from '../../components/ui/field';

describe('button', () => {
  it('says what it costs and does what it says', () => {
    const press = jest.fn();
    render(<Button label="Bake" cost="about 9 s" onPress={press} />);
    fireEvent.click(screen.getByRole('button', { name: 'Bake, about 9 s' }));
    expect(press).toHaveBeenCalledTimes(1);
  });

  it('tells why it cannot be pressed, and does nothing', () => {
    const press = jest.fn();
    render(<Button label="Set up a scene" disabledReason="Confirm the size first." onPress={press} />);
    fireEvent.click(screen.getByRole('button', { name: 'Set up a scene' }));
    expect(press).not.toHaveBeenCalled();
    expect(screen.getByText('Confirm the size first.')).toBeTruthy();
  });
});

describe('field', () => {
  it('names its unit and shows what is wrong beside it', () => {
    render(
      <Field
        label="Wind"
        unit="m/s"
        value="-3"
        onChangeText={() => undefined}
        error="Wind speed cannot be negative."
      />,
    );
    expect(screen.getByRole('textbox', { name: 'Wind, m/s' }).getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByRole('alert').textContent).toBe('Wind speed cannot be negative.');
  });
});

function Poisson({ onChange }: { onChange: (v: number) => void }) {
  const [value, setValue] = useState(0.3);
  return (
    <DimensionSlider
      label="Poisson’s ratio"
      value={value}
      min={0}
      max={0.49}
      step={0.01}
      format={(v) => v.toFixed(2)}
      refuse={(v) => (v >= 0.5 ? 'At 0.5 nothing can change volume. Use 0.49 or less.' : null)}
      onChange={(v) => {
        setValue(v);
        onChange(v);
      }}
    />
  );
}

describe('dimension slider', () => {
  it('steps by arrows, ten times as far with Shift', () => {
    const changed = jest.fn();
    render(<Poisson onChange={changed} />);
    const slider = screen.getByRole('slider', { name: 'Poisson’s ratio' });
    fireEvent.keyDown(slider, { key: 'ArrowRight' });
    expect(changed).toHaveBeenLastCalledWith(expect.closeTo(0.31));
    fireEvent.keyDown(slider, { key: 'ArrowLeft', shiftKey: true });
    expect(changed).toHaveBeenLastCalledWith(expect.closeTo(0.21));
    expect(slider.getAttribute('aria-valuetext')).toBe('0.21');
  });
});
