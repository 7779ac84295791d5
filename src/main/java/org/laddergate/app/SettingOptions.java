package org.laddergate.app;

import java.util.EnumMap;
import java.util.Map;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Model.OptionSpec;

/** Puts rows of the table of settings on a command and reads them back. */
final class SettingOptions {
    private SettingOptions() {}

    static void add(CommandSpec command, Setting... settings) {
        for (Setting setting : settings) {
            boolean isSwitch = setting.parameter().isEmpty();
            String standard = setting.standard().isEmpty() ? "" : "; standard: " + setting.standard();
            command.addOption(OptionSpec.builder(setting.option())
                    .type(String.class)
                    .arity(isSwitch ? "0" : "1")
                    .fallbackValue(isSwitch ? "true" : "")
                    .paramLabel(isSwitch ? "" : "<" + setting.parameter() + ">")
                    .description(setting.help() + " (" + setting.variable() + standard + ")")
                    .build());
        }
    }

    static Settings read(CommandSpec command, Map<String, String> environment) {
        Map<Setting, String> options = new EnumMap<>(Setting.class);
        for (Setting setting : Setting.values()) {
            OptionSpec option = command.findOption(setting.option());
            if (option != null && option.getValue() != null) {
                options.put(setting, option.getValue());
            }
        }
        return Settings.of(options, environment);
    }
}
