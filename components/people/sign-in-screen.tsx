import { Redirect } from 'expo-router';
import { useFormik } from 'formik';
import { useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import * as Yup from 'yup';
import { fieldFaults } from '../api/problem';
import { useSession } from '../api/session';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Field } from '../ui/field';
import { Text } from '../ui/text';
import { Wordmark } from '../ui/wordmark';
import { PuddingDrawing } from './pudding-drawing';

const schema = Yup.object({
  email: Yup.string().required('Give your e-mail address.').email('This is no e-mail address.'),
  password: Yup.string().required('Give your password.'),
});

/** The door: what the desk is for, and the form. */
export function SignInScreen() {
  const { me, signIn } = useSession();
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const [refused, setRefused] = useState<string | null>(null);
  const form = useFormik({
    initialValues: { email: '', password: '' },
    validationSchema: schema,
    onSubmit: async ({ email, password }, { setErrors }) => {
      setRefused(null);
      try {
        await signIn(email, password);
      } catch (error) {
        const { byField, rest } = fieldFaults(error, ['email', 'password']);
        setErrors(byField);
        setRefused(rest);
      }
    },
  });
  if (me) return <Redirect href="/today" />;
  const submit = () => void form.submitForm();
  const fault = (field: 'email' | 'password') => (form.touched[field] ? (form.errors[field] ?? null) : null);
  return (
    <ScrollView style={{ backgroundColor: colors.page }} contentContainerStyle={[styles.page, wide && styles.wide]}>
      <View style={[styles.drawing, wide && styles.half]}>
        <Wordmark width={wide ? 168 : 120} />
        <Text variant={wide ? 'title' : 'titlePhone'} level={1}>
          See how it moves, the day the model arrives.
        </Text>
        <Text color="ink2" style={styles.lead}>
          Bring a curved-surface model as it is. Give it rubber, foam or flesh, hold it, push it, and keep the run you
          agree on.
        </Text>
        <PuddingDrawing width={wide ? 520 : 320} />
      </View>
      <View style={[styles.form, wide && { ...styles.side, borderLeftColor: colors.hair }]}>
        <Text variant="section" level={2}>
          Sign in
        </Text>
        <View style={styles.fields}>
          <Field
            label="E-mail"
            value={form.values.email}
            onChangeText={form.handleChange('email')}
            onBlur={() => void form.setFieldTouched('email')}
            onSubmit={submit}
            error={fault('email')}
            keyboard="email-address"
            autoComplete="email"
          />
          <Field
            label="Password"
            value={form.values.password}
            onChangeText={form.handleChange('password')}
            onBlur={() => void form.setFieldTouched('password')}
            onSubmit={submit}
            error={fault('password')}
            secret
            autoComplete="current-password"
          />
        </View>
        {refused ? (
          <Text variant="note" color="apricot" role="alert">
            {refused}
          </Text>
        ) : null}
        <Button kind="primary" label="Sign in" working={form.isSubmitting && 'Signing in …'} onPress={submit} />
        <Text variant="note" color="ink2">
          No account? An administrator of your studio makes one.
        </Text>
      </View>
    </ScrollView>
  );
}

const styles = StyleSheet.create({
  page: { minHeight: '100%', padding: space.l, gap: space.xl, justifyContent: 'center' },
  wide: { flexDirection: 'row', padding: 0, gap: 0, justifyContent: 'space-between' },
  drawing: { gap: space.m },
  half: { flex: 1, padding: space.huge, justifyContent: 'center', gap: space.l },
  lead: { maxWidth: 460 },
  form: { gap: space.l, width: '100%', maxWidth: 420 },
  side: { width: 420, padding: space.huge, justifyContent: 'center', borderLeftWidth: 1 },
  fields: { gap: space.l },
});
