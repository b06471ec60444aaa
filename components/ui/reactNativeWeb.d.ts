import 'react-native';

// What react-native-web passes on to the page and React Native's own types do not list.
declare module 'react-native' {
  interface ViewProps {
    dataSet?: Record<string, string | undefined>;
    'aria-level'?: number;
    'aria-describedby'?: string;
    'aria-current'?: 'page' | 'step' | 'true';
    'aria-roledescription'?: string;
    tabIndex?: 0 | -1;
  }
  interface TextProps {
    dataSet?: Record<string, string | undefined>;
    'aria-level'?: number;
    'aria-describedby'?: string;
    tabIndex?: 0 | -1;
  }
}
