/** Languages that captions may be in: tag (BCP 47) and its name for the captions menu. */
export const LANGUAGES = {
  en: "English",
  es: "Español",
  fr: "Français",
  de: "Deutsch",
  pl: "Polski",
  pt: "Português",
  zh: "中文",
  vi: "Tiếng Việt",
  tl: "Tagalog",
  hi: "हिन्दी",
} as const;

export type Language = keyof typeof LANGUAGES;
export const LANGUAGE_TAGS = Object.keys(LANGUAGES) as [Language, ...Language[]];
