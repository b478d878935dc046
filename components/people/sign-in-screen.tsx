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
import { TitleBlock } from '../ui/title-block';
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
  const { wide, width } = useBreakpoint();
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
      <View style={[wide ? styles.stage : styles.top, { backgroundColor: colors.stage, borderColor: colors.hair }]}>
        <PuddingDrawing width={wide ? Math.min(920, 0.92 * (width - FORM)) : Math.min(420, width)} />
        {wide ? (
          <TitleBlock
            cells={[
              { label: 'Drawing', value: 'Steamed pudding, at rest' },
              { label: 'Unit', value: 'mm', mono: true },
            ]}
            phone={[]}
          />
        ) : null}
      </View>
      <View style={wide ? styles.side : styles.form}>
        <Wordmark width={wide ? 178 : 112} />
        <Text color="ink2" level={1} style={styles.lead}>
          How the new model will move, the day it arrives.
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
          No account yet? Your studio’s administrator makes one. Nobody can sign up alone.
        </Text>
      </View>
    </ScrollView>
  );
}

const FORM = 480;

const styles = StyleSheet.create({
  page: { minHeight: '100%' },
  wide: { flexDirection: 'row' },
  top: { alignItems: 'center', borderBottomWidth: 1 },
  stage: { flex: 1, alignItems: 'center', justifyContent: 'center', borderRightWidth: 1 },
  form: { gap: space.l, padding: 20, width: '100%', maxWidth: 460, alignSelf: 'center' },
  side: { width: FORM, padding: 64, gap: space.l, justifyContent: 'center' },
  lead: { maxWidth: 260 },
  fields: { gap: space.l },
});
