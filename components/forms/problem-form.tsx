'use client';

import { FormikProvider, getIn, setIn, useFormik } from 'formik';
import type { FormikConfig, FormikHelpers, FormikValues } from 'formik';
import { createContext, useContext, useState } from 'react';
import type { ReactNode } from 'react';
import { problemOf } from '@/components/ui/problem';
import type { Problem } from '@/components/ui/problem';

export interface ProblemFormConfig<Values extends FormikValues> {
  initialValues: Values;
  /** A yup schema, for messages while typing; the server has the last word. */
  validationSchema?: FormikConfig<Values>['validationSchema'];
  /** Sends the values. A ProblemError thrown here is shown on its fields; what was typed is kept. */
  onSubmit: (values: Values, helpers: FormikHelpers<Values>) => Promise<unknown>;
  enableReinitialize?: boolean;
}

function isFieldOf(values: unknown, path: string): boolean {
  return path !== '' && getIn(values, path) !== undefined;
}

/** A Formik form that understands problem details: `errors[{path, message}]` land on the fields of the same name. */
export function useProblemForm<Values extends FormikValues>(config: ProblemFormConfig<Values>) {
  const [problem, setProblem] = useState<Problem | undefined>(undefined);
  const formik = useFormik<Values>({
    ...config,
    validateOnMount: false,
    onSubmit: async (values, helpers) => {
      setProblem(undefined);
      try {
        await config.onSubmit(values, helpers);
      } catch (failure) {
        const refused = problemOf(failure);
        const own = (refused.errors ?? []).filter(({ path }) => isFieldOf(values, path));
        helpers.setStatus(
          own.reduce<object>(
            (held, { path, message }) => setIn(held, path, { message, value: getIn(values, path) as unknown }),
            {},
          ),
        );
        setProblem(refused);
      }
    },
  });
  return { formik, problem, setProblem };
}

export type ProblemFormState<Values extends FormikValues> = ReturnType<typeof useProblemForm<Values>>;

const ProblemContext = createContext<{ problem: Problem | undefined; values: unknown }>({ problem: undefined, values: {} });

/** The problem the form above was refused with. */
export function useFormProblem(): { problem: Problem | undefined; values: unknown } {
  return useContext(ProblemContext);
}

export interface ProblemFormProps<Values extends FormikValues> {
  form: ProblemFormState<Values>;
  children: ReactNode;
  /** Read out for the form as a whole. */
  label?: string;
  className?: string;
}

/** The form element around the fields. */
export function ProblemForm<Values extends FormikValues>({
  form: { formik, problem },
  children,
  label,
  className,
}: ProblemFormProps<Values>) {
  return (
    <FormikProvider value={formik}>
      <ProblemContext.Provider value={{ problem, values: formik.values }}>
        <form
          method="post"
          noValidate
          aria-label={label}
          onSubmit={formik.handleSubmit}
          className={className ?? 'flex flex-col gap-4'}
        >
          {children}
        </form>
      </ProblemContext.Provider>
    </FormikProvider>
  );
}
