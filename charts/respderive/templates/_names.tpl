{{- define "respderive.name" -}}
{{- if contains .Chart.Name .Release.Name }}{{ .Release.Name | trunc 53 | trimSuffix "-" }}{{ else }}{{ printf "%s-%s" .Release.Name .Chart.Name | trunc 53 | trimSuffix "-" }}{{ end }}
{{- end }}

{{- define "respderive.selector" -}}
app.kubernetes.io/name: {{ .Chart.Name }}
app.kubernetes.io/instance: {{ .Release.Name }}
{{- end }}

{{- define "respderive.labels" -}}
{{ include "respderive.selector" . }}
app.kubernetes.io/version: {{ .Chart.AppVersion | quote }}
app.kubernetes.io/managed-by: {{ .Release.Service }}
helm.sh/chart: {{ printf "%s-%s" .Chart.Name .Chart.Version }}
{{- end }}

{{- define "respderive.image" -}}
{{- if .Values.image.digest }}{{ .Values.image.repository }}@{{ .Values.image.digest }}{{ else }}{{ .Values.image.repository }}:{{ .Values.image.tag | default .Chart.AppVersion }}{{ end }}
{{- end }}

{{/* Settings as environment variables: a map or list adds its key or index to the name. */}}
{{- define "respderive.environment" -}}
{{- $name := .name }}
{{- if kindIs "map" .value }}
{{- range $key, $value := .value }}{{ include "respderive.environment" (dict "name" (printf "%s__%s" $name $key) "value" $value) }}{{ end }}
{{- else if kindIs "slice" .value }}
{{- range $index, $value := .value }}{{ include "respderive.environment" (dict "name" (printf "%s__%d" $name $index) "value" $value) }}{{ end }}
{{- else if kindIs "string" .value }}
{{ $name }}: {{ .value | quote }}
{{- else }}
{{ $name }}: {{ .value | toJson | quote }}
{{- end }}
{{- end }}
