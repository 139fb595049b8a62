export function startIntegrationServices(): Promise<{
  environment: Record<string, string>;
  dispose(): Promise<void>;
}>;
