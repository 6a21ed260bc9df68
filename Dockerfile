# syntax=docker/dockerfile:1
FROM mcr.microsoft.com/dotnet/sdk:10.0 AS build
WORKDIR /build
ENV CI=true DOTNET_CLI_TELEMETRY_OPTOUT=1 DOTNET_NOLOGO=1

# Packages first: this layer is built anew only when a project file or a lock file changes.
COPY global.json Directory.Build.props Directory.Packages.props BannedSymbols.txt .globalconfig .editorconfig ./
COPY src/RespDerive.Physiology/*.csproj src/RespDerive.Physiology/packages.lock.json src/RespDerive.Physiology/
COPY src/RespDerive.Timeline/*.csproj src/RespDerive.Timeline/packages.lock.json src/RespDerive.Timeline/
COPY src/RespDerive.Fhir/*.csproj src/RespDerive.Fhir/packages.lock.json src/RespDerive.Fhir/
COPY src/RespDerive.Storage/*.csproj src/RespDerive.Storage/packages.lock.json src/RespDerive.Storage/
COPY src/RespDerive.Sandbox/*.csproj src/RespDerive.Sandbox/packages.lock.json src/RespDerive.Sandbox/
COPY src/RespDerive.Service/*.csproj src/RespDerive.Service/packages.lock.json src/RespDerive.Service/
COPY src/RespDerive/*.csproj src/RespDerive/packages.lock.json src/RespDerive/
RUN dotnet restore src/RespDerive --locked-mode

# Published without a runtime identifier, as locked; of the native SQLite libraries only those for Linux with glibc are kept.
COPY src/ src/
RUN dotnet publish src/RespDerive --configuration Release --no-restore --output /out -p:UseAppHost=false \
    && find /out/runtimes -mindepth 1 -maxdepth 1 ! -name linux-x64 ! -name linux-arm64 -exec rm -r {} + \
    && mkdir /empty

FROM mcr.microsoft.com/dotnet/aspnet:10.0-noble-chiseled AS run
LABEL org.opencontainers.image.title="respderive" \
      org.opencontainers.image.description="Derived respiratory values as FHIR R4 Observations" \
      org.opencontainers.image.licenses="Apache-2.0" \
      org.opencontainers.image.version="0.1.0"
WORKDIR /app

# The base has no time zones; the setting TimeZone needs them.
COPY --from=build /usr/share/zoneinfo /usr/share/zoneinfo
COPY --from=build /out ./
COPY LICENSE NOTICE ./

# The store. A volume made from the image takes over this owner, the base's APP_UID; elsewhere that user needs write access.
COPY --from=build --chown=1654:1654 /empty /data
VOLUME /data

ENV ASPNETCORE_HTTP_PORTS=8080 \
    DOTNET_EnableDiagnostics=0 \
    RespDerive__Store=/data/respderive.db
EXPOSE 8080
USER $APP_UID
ENTRYPOINT ["dotnet", "respderive.dll"]
CMD ["serve"]
