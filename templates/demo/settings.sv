// What the harbour office can set: named registers, a bank of calibration words, and a journal of the writes.
module settings (
    input  logic        clk,
    input  logic        rst,           // synchronous
    input  logic        write,
    input  logic [4:0]  address,
    input  logic [15:0] data,
    input  logic [3:0]  journal_line,
    output logic [11:0] datum,
    output logic [11:0] alarm_level,
    output logic [15:0] report_every,
    output logic [7:0]  station,
    output logic [15:0] read_data,
    output logic [15:0] journal_data
);
    // 0 to 3: named registers
    always_ff @(posedge clk) begin
        if (rst) begin
            datum        <= 12'd0;
            alarm_level  <= 12'hfff;
            report_every <= 16'd600;
            station      <= 8'd0;
        end else if (write) begin
            case (address)
                5'd0: datum        <= data[11:0];
                5'd1: alarm_level  <= data[11:0];
                5'd2: report_every <= data;
                5'd3: station      <= data[7:0];
                default: ;
            endcase
        end
    end

    // 8 to 15: calibration words, a register file of flops
    logic [15:0] calibration [0:7];
    always_ff @(posedge clk) begin
        for (int i = 0; i < 8; i++) begin
            if (rst) calibration[i] <= 16'd0;
            else if (write && address == 5'd8 + 5'(i)) calibration[i] <= data;
        end
    end

    // The words are read one clock after they are asked for.
    always_ff @(posedge clk) begin
        if (rst) read_data <= 16'd0;
        else if (!write) begin
            if (address[3]) read_data <= calibration[address[2:0]];
            else if (address[1:0] == 2'd0) read_data <= {4'd0, datum};
            else if (address[1:0] == 2'd1) read_data <= {4'd0, alarm_level};
            else if (address[1:0] == 2'd2) read_data <= report_every;
            else read_data <= {8'd0, station};
        end
    end

    // A journal of the last sixteen writes: an array that is written by a variable index.
    logic [15:0] journal [0:15];
    logic [3:0]  line;
    always_ff @(posedge clk) begin
        if (rst) line <= 4'd0;
        else if (write) begin
            journal[line] <= data;
            line <= line + 4'd1;
        end
    end
    assign journal_data = journal[journal_line];
endmodule
